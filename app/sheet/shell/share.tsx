import { Link } from 'react-router'
import { ShellSymbol } from './symbols'
import { useSheetState } from './use-sheet'

/** To the read-only links of this section. Readers of the site, who may neither see nor make links, get no button. */
export function ShareButton() {
  const sectionId = useSheetState((state) => state.sectionId)
  const sees = useSheetState((state) => state.acts.includes('link.see') || state.acts.includes('link.make'))
  if (!sees) return null
  return (
    <Link to={`/sections/${sectionId}/links`} className="button bar-button" aria-label="Share by a read-only link">
      <ShellSymbol name="share" />
      <span className="bar-word">Share</span>
    </Link>
  )
}
