import { ACTS, type Act, type Grade } from './acts'

/**
 * What is known about somebody towards a thing, gathered by facts.server.ts in one query. Pure data, so that the page, the
 * server and the sidecar decide alike.
 */
export type Standing = {
  grades: Grade[]
  /** The section or its site is archived: it can be seen and restored, not changed. */
  archived?: boolean
  /** The one who prepared what is to be signed: nobody checks their own work. */
  prepared?: boolean
}

/** `status`: 404 when the thing may not even be seen (absence and refusal look alike), 403 when it may be seen but not acted on. */
export type Decision = { yes: true } | { yes: false; status: 403 | 404; why: string }

const drawers: Grade[] = ['principal', 'engineer', 'checker', 'guest-editor']
const members: Grade[] = ['principal', 'engineer', 'checker', 'reader']
const makers: Grade[] = ['principal', 'engineer', 'checker']
const seers: Grade[] = [...members, 'owner', 'guest-editor', 'guest-reader']
const heads: Grade[] = ['principal', 'owner']

/** The permission table: act → the grades that may. Anything not listed is refused. */
export const TABLE: Record<Act, readonly Grade[]> = {
  'practice.see': members,
  'practice.manage': ['principal'],
  'people.see': members,
  'people.invite': ['principal'],
  'people.change': ['principal'],
  'audit.see': ['principal'],
  'materials.edit': makers,
  'site.see': seers,
  'site.create': makers,
  'site.edit': makers,
  'site.archive': heads,
  'site.share': heads,
  'section.see': [...seers, 'link'],
  'section.create': drawers,
  'section.edit': drawers,
  'section.rename': drawers,
  'section.duplicate': drawers,
  'section.archive': makers,
  'section.export': [...seers, 'link'],
  'history.see': [...members, 'owner', 'guest-editor'],
  'history.restore': drawers,
  'link.see': [...makers, 'owner'],
  'link.make': heads,
  'link.revoke': heads,
  'comment.see': seers,
  'comment.write': seers,
  'check.send': drawers,
  'check.sign': ['principal', 'checker'],
  'revision.see': [...seers, 'link'],
  'revision.issue': ['principal', 'checker'],
}

/** Acts that change an archived thing; refused with a way forward until it is restored. */
const CHANGES_THE_THING: ReadonlySet<Act> = new Set<Act>([
  'section.create',
  'section.edit',
  'section.rename',
  'history.restore',
  'check.send',
  'check.sign',
  'revision.issue',
  'link.make',
])

/** The act that must be allowed for a refusal to be a 403: whoever may not see the thing is told 404. */
function seeing(act: Act): Act {
  if (act === 'site.create') return 'practice.see'
  if (act === 'section.create') return 'site.see'
  const subject = act.split('.')[0]
  if (subject === 'site') return 'site.see'
  if (subject === 'practice' || subject === 'people' || subject === 'audit' || subject === 'materials')
    return 'practice.see'
  return 'section.see'
}

const allows = (act: Act, grades: readonly Grade[]) => grades.some((g) => TABLE[act].includes(g))

/**
 * May somebody with this standing do this act? The single authority: loaders, actions, API routes, live tickets, the sidecar,
 * exports and e-mails all ask here.
 *
 * For acts that create inside a container (`site.create`, `section.create`) pass the standing towards the container; a person
 * who sees the container but may not create gets 403.
 */
export function can(who: Standing, act: Act): Decision {
  if (!allows(act, who.grades)) {
    const sees = allows(seeing(act), who.grades)
    return sees
      ? {
          yes: false,
          status: 403,
          why: 'Your role does not allow this. Ask the head of the practice or the owner of the site.',
        }
      : { yes: false, status: 404, why: 'There is nothing here, or it is not shared with you.' }
  }
  if (who.archived && CHANGES_THE_THING.has(act))
    return { yes: false, status: 403, why: 'This is archived. Restore it first, then change it.' }
  if (who.prepared && act === 'check.sign')
    return { yes: false, status: 403, why: 'Nobody checks their own work. Send it to a colleague.' }
  return { yes: true }
}

/** Every act this standing allows; for hiding what a page should not offer. */
export const allowed = (who: Standing): Act[] => ACTS.filter((act) => can(who, act).yes)
