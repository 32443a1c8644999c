import { describe, expect, it } from 'vitest'
import { safePath } from './redirect.server'

describe('where to go after signing in', () => {
  it.each(['/sites', '/sites?q=weir&sort=name', '/sections/1#depth'])('keeps our own %s', (path) => {
    expect(safePath(path)).toBe(path)
  })

  it.each([
    'https://other.example/',
    '//other.example/',
    '/\\other.example',
    '/\t/other.example',
    'javascript:alert(1)',
    '',
    null,
    undefined,
    7,
  ])('goes home instead of to %j', (wanted) => {
    expect(safePath(wanted)).toBe('/home')
  })
})
