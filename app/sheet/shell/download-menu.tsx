import { useState } from 'react'
import { Button, Dialog, DialogTrigger, Popover } from 'react-aria-components'
import { PAPERS } from '~/drawing'
import { usePopClass } from './pop'
import { ShellSymbol } from './symbols'
import { useSheetState } from './use-sheet'

export const SCALES = [100, 200, 250, 500, 1000, 1250, 2000, 2500, 5000] as const

export type Download = { sectionId: string; token: string | null; caseId: string | null }

/** Address of a download; a link holder's token goes along, since they have no account to be known by. */
export function downloadAddress(
  file: 'sheet.svg' | 'profile.csv' | 'section.json',
  { sectionId, token, caseId }: Download,
  choice: { paper?: string; scale?: string } = {},
): string {
  const query = new URLSearchParams()
  if (token) query.set('link', token)
  if (caseId) query.set('case', caseId)
  if (choice.paper) query.set('paper', choice.paper)
  if (choice.scale) query.set('scale', choice.scale)
  const text = query.toString()
  return `/api/sections/${sectionId}/${file}${text ? `?${text}` : ''}`
}

/** What leaves the sheet: the drawing on paper at a scale, the profile as numbers, the section itself. */
export function DownloadMenu({ token }: { token: string | null }) {
  const popClass = usePopClass()
  const sectionId = useSheetState((state) => state.sectionId)
  const caseId = useSheetState((state) => state.caseId)
  const caseName = useSheetState((state) => state.live.section.cases.find(({ id }) => id === state.caseId)?.name)
  const [paper, setPaper] = useState<string>('A3')
  const [scale, setScale] = useState('')
  const from = { sectionId, token, caseId }
  return (
    <DialogTrigger>
      <Button className="button bar-button" aria-label="Download">
        <ShellSymbol name="download" />
        <span className="bar-word">Download</span>
      </Button>
      <Popover className={popClass('download-pop')} placement="bottom end">
        <Dialog aria-label="Download">
          <section aria-label="What to download">
            <h2 className="pop-title">Download</h2>
            <p className="quiet">{caseId ? `With the values of “${caseName ?? caseId}”.` : 'As drawn.'}</p>
            <fieldset className="paper-choice">
              <legend>The sheet, drawn to scale</legend>
              <label>
                Paper
                <select value={paper} onChange={(event) => setPaper(event.target.value)}>
                  {Object.keys(PAPERS).map((name) => (
                    <option key={name} value={name}>
                      {name} landscape
                    </option>
                  ))}
                </select>
              </label>
              <label>
                Scale
                <select value={scale} onChange={(event) => setScale(event.target.value)}>
                  <option value="">largest that fits</option>
                  {SCALES.map((n) => (
                    <option key={n} value={n}>
                      1:{n}
                    </option>
                  ))}
                </select>
              </label>
              <a className="button solid wide" href={downloadAddress('sheet.svg', from, { paper, scale })} download>
                Sheet as SVG
              </a>
            </fieldset>
            <a className="button wide" href={downloadAddress('profile.csv', from)} download>
              Water table and discharge as CSV
            </a>
            <a className="button wide" href={downloadAddress('section.json', from)} download>
              Section as JSON
            </a>
            <p className="caution-line">
              A screening estimate under the Dupuit–Forchheimer assumptions: no substitute for site investigation, local
              codes or a licensed professional.
            </p>
          </section>
        </Dialog>
      </Popover>
    </DialogTrigger>
  )
}
