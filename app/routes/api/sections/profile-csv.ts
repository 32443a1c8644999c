import { personOf } from '~/server/context.server'
import { db } from '~/server/db.server'
import { sendFile } from '~/server/sections/send-file.server'
import type { Route } from './+types/profile-csv'

/** The water table along the strip as a table; see sendFile for who may have it. */
export const loader = ({ request, context, params }: Route.LoaderArgs) =>
  sendFile(db, request, personOf(context), params.sectionId, 'profile.csv')
