import { Link } from 'react-router'
import { Brand } from '~/ui/brand'
import { CaseTabs } from './case-tabs'
import { DownloadMenu } from './download-menu'
import { MoreMenu } from './more-menu'
import { People } from './people'
import { ShareButton } from './share'
import { StoredLight } from './stored-light'
import type { Surround } from './surround'
import { TitleField } from './title-field'

/**
 * Where this is, which case, who else is here, whether it is stored, and the ways out of the door. `shut`: the section may not be
 * seen any more, so nothing of it stands here either.
 */
export function TopBar({ surround, onRetry, shut }: { surround: Surround; onRetry?: () => void; shut: boolean }) {
  const { site, token } = surround
  return (
    <header className="top-bar">
      <div className="whereabouts">
        {token ? (
          <span className="brand">
            <Brand />
            <span className="brand-name">Doab</span>
          </span>
        ) : (
          <Link to="/home" className="brand" aria-label="Doab, to the sections of the practice">
            <Brand />
            <span className="brand-name">Doab</span>
          </Link>
        )}
        {shut ? null : (
          <>
            <SiteName site={site} here={token !== null} />
            <TitleField />
          </>
        )}
      </div>
      {shut ? null : <CaseTabs />}
      <div className="bar-end">
        {shut ? null : <People />}
        <StoredLight onRetry={onRetry} />
        {shut ? null : (
          <>
            {token ? null : <ShareButton />}
            <DownloadMenu token={token} />
            <MoreMenu />
          </>
        )}
      </div>
    </header>
  )
}

/** Holders of a link have no way into the site; they may know its name where the server gives it. */
function SiteName({ site, here }: { site: Surround['site']; here: boolean }) {
  if (!site) return null
  return here ? (
    <span className="site-name">{site.name}</span>
  ) : (
    <Link to={`/sites/${site.id}`} className="site-name">
      {site.name}
    </Link>
  )
}
