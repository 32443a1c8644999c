import type { Section } from '~/section'

/** The section document as text, two spaces deep: what `parseSection` takes back without a loss. */
export const sectionJson = (section: Section): string => `${JSON.stringify(section, null, 2)}\n`
