import type { ShouldRevalidateFunctionArgs } from 'react-router'
import { SharedSheet } from '~/pages/share/shared-sheet'
import { openShared } from '~/server/sections/open-section.server'
import type { Route } from './+types/s.$token'

/** The sheet as the holder of a read-only link sees it. No account, no cookie: the token in the address is the key. */
export async function loader({ params, request }: Route.LoaderArgs) {
  const opened = await openShared(params.token, new URL(request.url).searchParams.get('case'))
  return { ...opened, token: params.token, userId: null }
}

export const shouldRevalidate = ({ currentParams, nextParams }: ShouldRevalidateFunctionArgs) =>
  currentParams.token !== nextParams.token

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: loaderData ? `${loaderData.live.section.title} · Doab` : 'Doab' },
  { name: 'robots', content: 'noindex' },
]

export default function SharedRoute({ loaderData }: Route.ComponentProps) {
  return <SharedSheet key={loaderData.sectionId} first={loaderData} />
}
