import { useEffect, useState } from 'react'
import type { Leftover } from '../connection'
import type { LiveSheet } from './open-live'
import { saveAsFile } from './save-file'

/** Edits made here before an earlier version was restored: they cannot join any more, but nothing is thrown away unasked. */
export function Leftovers({ live }: { live: LiveSheet }) {
  const [left, setLeft] = useState<Leftover[]>([])
  useEffect(() => {
    let gone = false
    void live.connection.leftovers().then((found) => {
      if (!gone) setLeft(found.filter(({ waiting }) => waiting > 0))
    })
    return () => {
      gone = true
    }
  }, [live])
  const [first] = left
  if (!first) return null
  const drop = () => setLeft((all) => all.filter((one) => one !== first))
  const save = async () => {
    const { sectionIn } = await import('./section-in')
    saveAsFile(sectionIn(await first.open()))
  }
  return (
    <div className="notice" role="status">
      <p>
        {first.waiting === 1 ? '1 edit' : `${first.waiting} edits`} made on this machine came too late: an earlier
        version of this section was restored meanwhile.
      </p>
      <p className="buttons">
        <button type="button" className="button" onClick={() => void save()}>
          Save them as a file
        </button>
        <button type="button" className="button" onClick={() => void first.forget().then(drop)}>
          Forget them
        </button>
      </p>
    </div>
  )
}
