import type { Section } from '~/section'

/** Hands the section to the person as a file, in the public format; it can be opened as a new section. */
export function saveAsFile(section: Section) {
  const file = new Blob([JSON.stringify(section, null, 2)], { type: 'application/json' })
  const address = URL.createObjectURL(file)
  const anchor = document.createElement('a')
  anchor.href = address
  anchor.download = `${section.title.replace(/[^\p{L}\p{N}]+/gu, '-') || 'section'}.json`
  anchor.click()
  setTimeout(() => URL.revokeObjectURL(address), 10_000)
}
