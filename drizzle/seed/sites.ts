import * as Y from 'yjs'
import { writeSection } from '~/live'
import type { Section } from '~/section'
import type { Executor } from '../client'
import { createLog } from '../log'
import { section as sectionTable, site, siteShare } from '../schema'
import type { Seeded } from './people'
import { brookToCanal } from './sections/brook-to-canal'
import { cutOffWall } from './sections/cut-off-wall'
import { drainedField } from './sections/drained-field'
import { gainingAndLosing } from './sections/gaining-and-losing'
import { siltAndCellar } from './sections/silt-and-cellar'
import { wholeValley } from './sections/whole-valley'

/** The demo's jobs, in a valley that is on no map. `owner` and `by` are addresses of people.json. */
export const SITES = [
  {
    name: 'Amble water meadows',
    number: 'KM-2604',
    place: 'Amble valley, left bank',
    client: 'Amble Valley Drainage Board',
    note: 'Water levels for the new weir setting: what stands wet, what runs dry, and what the canal gives away.',
    owner: 'ines@kellmarsh.example',
    shared: true,
    sections: [
      { section: brookToCanal, by: 'tom@kellmarsh.example' },
      { section: gainingAndLosing, by: 'tom@kellmarsh.example' },
      { section: drainedField, by: 'mira@kellmarsh.example' },
      { section: wholeValley, by: 'tom@kellmarsh.example' },
    ],
  },
  {
    name: 'Sallow Beck cutting',
    number: 'KM-2611',
    place: 'Hanger Wood to Teasel Mill',
    client: 'Sallow Lane Railway Trust',
    note: 'Keeping the cutting and the mill house dry; the pump may not run for good.',
    owner: 'tom@kellmarsh.example',
    shared: false,
    sections: [
      { section: siltAndCellar, by: 'tom@kellmarsh.example' },
      { section: cutOffWall, by: 'mira@kellmarsh.example' },
    ],
  },
] satisfies {
  name: string
  number: string
  place: string
  client: string
  note: string
  owner: string
  shared: boolean
  sections: { section: Section; by: string }[]
}[]

export async function seedSites(db: Executor, { practiceId, userIdOf, outsiderId }: Seeded): Promise<void> {
  for (const { owner, shared, sections, ...words } of SITES) {
    const siteId = crypto.randomUUID()
    const ownerId = userIdOf(owner)
    await db.insert(site).values({ id: siteId, practiceId, ownerId, ...words })
    if (shared) await db.insert(siteShare).values({ siteId, userId: outsiderId, role: 'reader', createdBy: ownerId })
    for (const { section, by } of sections) {
      const id = crypto.randomUUID()
      await db.insert(sectionTable).values({ id, siteId, practiceId, title: section.title, createdBy: userIdOf(by) })
      const doc = new Y.Doc()
      writeSection(doc, section)
      await createLog(db, id, Y.encodeStateAsUpdate(doc))
      doc.destroy()
    }
  }
}
