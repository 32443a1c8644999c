/** Every act that Doab asks about. The table in decide.ts says who may do which; DEVELOPERS.md prints it. */
export const ACTS = [
  'practice.see',
  'practice.manage',
  'people.see',
  'people.invite',
  'people.change',
  'audit.see',
  'materials.edit',
  'site.see',
  'site.create',
  'site.edit',
  'site.archive',
  'site.share',
  'section.see',
  'section.create',
  'section.edit',
  'section.rename',
  'section.duplicate',
  'section.archive',
  'section.export',
  'history.see',
  'history.restore',
  'link.see',
  'link.make',
  'link.revoke',
  'comment.see',
  'comment.write',
  'check.send',
  'check.sign',
  'revision.see',
  'revision.issue',
] as const
export type Act = (typeof ACTS)[number]

/** What somebody is towards one practice, site or section. A person may hold several at once (an engineer who owns the site). */
export const GRADES = [
  'principal',
  'engineer',
  'checker',
  'reader',
  'owner',
  'guest-editor',
  'guest-reader',
  'link',
] as const
export type Grade = (typeof GRADES)[number]

export const PRACTICE_ROLES = ['principal', 'engineer', 'checker', 'reader'] as const
export type PracticeRole = (typeof PRACTICE_ROLES)[number]
export const SHARE_ROLES = ['editor', 'reader'] as const
export type ShareRole = (typeof SHARE_ROLES)[number]
