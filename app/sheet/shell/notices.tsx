import { Link } from 'react-router'
import { CLOSE } from '../../live/codes'
import type { LinkState } from '../state'
import { saveAsFile } from './save-file'
import type { Surround } from './surround'
import { useSheet, useSheetState } from './use-sheet'

/** The server said that this page may not see the section any more: then it does not show it any more. */
export const barred = (link: LinkState, byLink: boolean): boolean =>
  link.kind === 'refused' &&
  (link.code === CLOSE.noRight || link.code === CLOSE.gone || (byLink && link.code === CLOSE.ticket))

/** What stands between the reader and their work, in words, with the way on. */
export function Notices({ surround }: { surround: Surround }) {
  const sheet = useSheet()
  const link = useSheetState((state) => state.link)
  if (link.kind !== 'refused') return null
  const byLink = surround.token !== null
  const shut = barred(link, byLink)
  return (
    <div className={shut ? 'notice gone-notice' : 'notice'} role="alert">
      {shut ? <h2>{byLink ? 'This link leads nowhere any more' : 'Not shared with you'}</h2> : null}
      <p>{shut && byLink ? 'It was revoked or has expired. Ask whoever sent it for a new one.' : link.says}</p>
      <p className="buttons">
        {link.code === CLOSE.ticket && !byLink ? (
          <Link className="button solid" to="/sign-in" reloadDocument>
            Sign in
          </Link>
        ) : null}
        {link.code === CLOSE.epoch || link.code === CLOSE.hostile ? (
          <button type="button" className="button solid" onClick={() => location.reload()}>
            Reload
          </button>
        ) : null}
        {link.waiting > 0 ? (
          <button type="button" className="button" onClick={() => saveAsFile(sheet.get().live.section)}>
            Save what is here as a file
          </button>
        ) : null}
        {shut && !byLink ? (
          <Link className="button" to="/home">
            To your sections
          </Link>
        ) : null}
      </p>
    </div>
  )
}
