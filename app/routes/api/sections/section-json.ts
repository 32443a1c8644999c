import { personOf } from '~/server/context.server'
import { db } from '~/server/db.server'
import { sendFile } from '~/server/sections/send-file.server'
import type { Route } from './+types/section-json'

/** The section document in the public format; see sendFile for who may have it. */
export const loader = ({ request, context, params }: Route.LoaderArgs) =>
  sendFile(db, request, personOf(context), params.sectionId, 'section.json')
