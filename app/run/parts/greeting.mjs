import { existsSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { ROOT } from './places.mjs'
import { bold, say } from './say.mjs'

/**
 * Says where Doab is and, where there is a demo, who can sign in.
 * @param {import('./settings.mjs').Settings} settings
 */
export function greet(settings) {
  say(`Doab is at ${bold(settings.appUrl)}`)
  const file = path.join(ROOT, 'drizzle/seed/people.json')
  if (!settings.real && existsSync(file)) {
    /** @type {{ password: string, people: { name: string, email: string, role: string }[] }} */
    const { password, people } = JSON.parse(readFileSync(file, 'utf8'))
    say(`Demo accounts, all with the password ${bold(password)}`)
    for (const { name, email, role } of people) say(`  ${email.padEnd(30)} ${name}, ${role}`)
  }
  if (settings.open && !settings.real)
    say('This address is public, but NODE_ENV is not production: everybody knows the demo’s passwords.')
  say('Ctrl-C stops everything.')
}
