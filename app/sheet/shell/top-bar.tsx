import { Link } from 'react-router'
import { BrandMark } from './brand'
import { CaseTabs } from './case-tabs'
import { DownloadMenu } from './download-menu'
import { MoreMenu } from './more-menu'
import { People } from './people'
import { ShareButton } from './share'
import { StoredLight } from './stored-light'
import type { Surround } from './surround'
import { TitleField } from './title-field'

/** Where this is, which case, who else is here, whether it is stored, and the ways out of the door. */
export function TopBar({ surround, onRetry }: { surround: Surround; onRetry?: () => void }) {
  const { site, token } = surround
  return (
    <header className="top-bar">
      <div className="whereabouts">
        {token ? (
          <span className="brand">
            <BrandMark />
            <span className="brand-name">Doab</span>
          </span>
        ) : (
          <Link to="/home" className="brand" aria-label="Doab, to the sections of the practice">
            <BrandMark />
            <span className="brand-name">Doab</span>
          </Link>
        )}
        {site && !token ? (
          <Link to={`/sites/${site.id}`} className="site-name">
            {site.name}
          </Link>
        ) : site ? (
          <span className="site-name">{site.name}</span>
        ) : null}
        <TitleField />
      </div>
      <CaseTabs />
      <div className="bar-end">
        <People />
        <StoredLight onRetry={onRetry} />
        {token ? null : <ShareButton />}
        <DownloadMenu token={token} />
        <MoreMenu />
      </div>
    </header>
  )
}
