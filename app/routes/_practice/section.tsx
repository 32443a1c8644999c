import type { ShouldRevalidateFunctionArgs } from 'react-router'
import { requirePerson } from '~/server/context.server'
import { openSection } from '~/server/sections/open-section.server'
import { type First, SheetPage } from '~/sheet/sheet'
import type { Route } from './+types/section'

/**
 * The sheet. The server folds the section's log and draws the first view; from then on the live document is the truth, so this is
 * loaded once.
 */
export async function loader({ context, params, request }: Route.LoaderArgs): Promise<First> {
  const person = requirePerson(context, request)
  const opened = await openSection(person, params.sectionId, new URL(request.url).searchParams.get('case'))
  return { ...opened, token: null, userId: person.userId }
}

/** Another section is another sheet; nothing else that happens on the page makes this one load anew. */
export const shouldRevalidate = ({ currentParams, nextParams }: ShouldRevalidateFunctionArgs) =>
  currentParams.sectionId !== nextParams.sectionId

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: loaderData ? `${loaderData.live.section.title} · Doab` : 'Doab' },
]

export default function SectionRoute({ loaderData }: Route.ComponentProps) {
  return <SheetPage key={loaderData.sectionId} first={loaderData} />
}
