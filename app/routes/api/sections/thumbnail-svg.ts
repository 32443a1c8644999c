import { personOf } from '~/server/context.server'
import { db } from '~/server/db.server'
import { sendThumbnail } from '~/server/sections/send-thumbnail.server'
import type { Route } from './+types/thumbnail-svg'

/** The small drawing that lists show. By itself, so that a list stays light and its drawings stay in the browser's cache. */
export const loader = ({ context, params, request }: Route.LoaderArgs) =>
  sendThumbnail(db, request, personOf(context), params.sectionId)
