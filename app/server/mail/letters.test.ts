import { describe, expect, it, vi } from 'vitest'

vi.mock('../env.server', () => ({ env: { APP_URL: 'https://doab.office.example' } }))
const { writeLetter } = await import('./letters.server')

const link = 'https://doab.office.example/reset?token=a&b=1'

describe('a letter', () => {
  it('says the same in text and HTML, with the link whole in both', () => {
    const { subject, text, html } = writeLetter({ kind: 'reset', to: 'a@b.example', name: 'Ada', link, minutes: 30 })
    expect(subject).toBe('Choose a new password for Doab')
    expect(text).toContain(`Choose a new password:\n${link}`)
    expect(html).toContain('href="https://doab.office.example/reset?token=a&amp;b=1"')
    for (const words of ['Hello Ada,', 'for 30 minutes']) {
      expect(text).toContain(words)
      expect(html).toContain(words)
    }
  })

  it('lets nobody put markup or headers into it by their name', () => {
    const letter = writeLetter({
      kind: 'invitation',
      to: 'a@b.example',
      inviter: '<img src=x onerror=alert(1)>\r\nBcc: all@b.example',
      practice: 'Reed & "Sedge"',
      as: 'an engineer',
      link,
      days: 7,
    })
    expect(letter.html).not.toContain('<img')
    expect(letter.html).toContain('&lt;img')
    expect(letter.html).toContain('Reed &amp; &quot;Sedge&quot;')
    expect(letter.subject).not.toMatch(/[\r\n]/)
    expect(letter.subject.length).toBeLessThanOrEqual(250)
  })
})
