import { describe, expect, it } from 'vitest'
import { ACTS, type Act, GRADES, type Grade } from './acts'
import { allowed, can, TABLE } from './decide'

/**
 * PRODUCT.md "Roles" written out by hand, so that the table in the code is checked against words and not against itself.
 * y = may, 3 = sees but may not (403), 4 = is told there is nothing (404).
 * Columns: principal engineer checker reader owner guest-editor guest-reader link
 */
const EXPECTED: Record<Act, string> = {
  'practice.see': 'yyyy4444',
  'practice.manage': 'y3334444',
  'people.see': 'yyyy4444',
  'people.invite': 'y3334444',
  'people.change': 'y3334444',
  'audit.see': 'y3334444',
  'materials.edit': 'yyy34444',
  'site.see': 'yyyyyyy4',
  'site.create': 'yyy34444',
  'site.edit': 'yyy33334',
  'site.archive': 'y333y334',
  'site.share': 'y333y334',
  'section.see': 'yyyyyyyy',
  'section.create': 'yyy33y34',
  'section.edit': 'yyy33y33',
  'section.rename': 'yyy33y33',
  'section.duplicate': 'yyy33y33',
  'section.archive': 'yyy33333',
  'section.export': 'yyyyyyyy',
  'history.see': 'yyyyyy33',
  'history.restore': 'yyy33y33',
  'link.see': 'yyy3y333',
  'link.make': 'y333y333',
  'link.revoke': 'y333y333',
  'comment.see': 'yyyyyyy3',
  'comment.write': 'yyyyyyy3',
  'check.send': 'yyy33y33',
  'check.sign': 'y3y33333',
  'revision.see': 'yyyyyyyy',
  'revision.issue': 'y3y33333',
}

const answer = (grades: Grade[], act: Act) => {
  const said = can({ grades }, act)
  return said.yes ? 'y' : String(said.status).charAt(2)
}

describe('the permission table, cell by cell', () => {
  for (const act of ACTS)
    for (const [column, grade] of GRADES.entries())
      it(`${grade} · ${act}`, () => expect(answer([grade], act)).toBe(EXPECTED[act].charAt(column)))

  it('tells nobody in particular 404 for everything', () => {
    expect(ACTS.map((act) => answer([], act)).join('')).toBe('4'.repeat(ACTS.length))
  })
  it('covers every act', () => expect(Object.keys(TABLE).sort()).toEqual([...ACTS].sort()))
})

describe('conditions on top of the table', () => {
  it('keeps an archived thing as it is, and lets it be restored', () => {
    const who = { grades: ['principal' as const], archived: true }
    expect(can(who, 'section.edit')).toMatchObject({ yes: false, status: 403 })
    expect(can(who, 'link.make')).toMatchObject({ yes: false, status: 403 })
    expect(can(who, 'section.see').yes).toBe(true)
    expect(can(who, 'section.archive').yes).toBe(true)
    expect(can(who, 'link.revoke').yes).toBe(true)
  })
  it('lets nobody check their own work, the principal included', () => {
    expect(can({ grades: ['checker'], prepared: true }, 'check.sign')).toMatchObject({ yes: false, status: 403 })
    expect(can({ grades: ['principal'], prepared: true }, 'check.sign')).toMatchObject({ yes: false, status: 403 })
  })
  it('adds grades up: an engineer who owns the site may share it', () => {
    expect(can({ grades: ['engineer', 'owner'] }, 'link.make').yes).toBe(true)
    expect(allowed({ grades: ['engineer'] })).not.toContain('link.make')
  })
})
