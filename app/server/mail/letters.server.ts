import { env } from '../env.server'

/** Every letter Doab sends. `to` is an e-mail address, `name` the person's name, `link` a full address. */
export type Letter =
  | { kind: 'reset'; to: string; name: string; link: string; minutes: number }
  | {
      kind: 'invitation'
      to: string
      inviter: string
      practice: string
      /** In words: "an engineer", "a checker". */
      as: string
      link: string
      days: number
    }
  | { kind: 'share'; to: string; name: string; sharer: string; site: string; may: 'edit' | 'read'; link: string }
  | { kind: 'note'; to: string; name: string; subject: string; paragraphs: string[]; link?: string; action?: string }

type Parts = {
  subject: string
  greeting: string
  paragraphs: string[]
  action?: { label: string; link: string }
  after: string[]
}

/** What a letter says, once; text and HTML are both made from it. */
function parts(letter: Letter): Parts {
  switch (letter.kind) {
    case 'reset':
      return {
        subject: 'Choose a new password for Doab',
        greeting: `Hello ${letter.name},`,
        paragraphs: ['Somebody asked to choose a new password for your Doab account. If it was you, do it here:'],
        action: { label: 'Choose a new password', link: letter.link },
        after: [
          `The link works once, for ${letter.minutes} minutes. Choosing a new password signs you out everywhere else.`,
          'If it was not you, leave this letter be: your password stays as it is.',
        ],
      }
    case 'invitation':
      return {
        subject: `${letter.inviter} invites you to ${letter.practice} on Doab`,
        greeting: 'Hello,',
        paragraphs: [
          `${letter.inviter} invites you to join ${letter.practice} as ${letter.as}. In Doab a practice draws its ground sections together and reads the water table from the drawing.`,
        ],
        action: { label: 'Join the practice', link: letter.link },
        after: [`The invitation holds for ${letter.days} days and only for this e-mail address.`],
      }
    case 'share':
      return {
        subject: `${letter.sharer} shared ${letter.site} with you`,
        greeting: `Hello ${letter.name},`,
        paragraphs: [
          `${letter.sharer} shared the site ${letter.site} with you. You may ${letter.may === 'edit' ? 'draw on its sections' : 'read its sections'}.`,
        ],
        action: { label: 'Open the site', link: letter.link },
        after: [],
      }
    case 'note':
      return {
        subject: letter.subject,
        greeting: `Hello ${letter.name},`,
        paragraphs: letter.paragraphs,
        action: letter.link ? { label: letter.action ?? 'Open it in Doab', link: letter.link } : undefined,
        after: [],
      }
  }
}

const escaped = (text: string) =>
  text.replace(/[&<>"']/g, (c) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' })[c] ?? c)

/** A subject is one line: a name with a line break in it must not become a header. */
const oneLine = (text: string) => text.replace(/\s+/g, ' ').trim().slice(0, 250)

const SIGNATURE = 'Doab: the section drawn together, with its water table.'

/** Subject, plain text and HTML of a letter. Names and titles people typed are escaped in the HTML. */
export function writeLetter(letter: Letter): { subject: string; text: string; html: string } {
  const { subject, greeting, paragraphs, action, after } = parts(letter)
  const text = [greeting, ...paragraphs, ...(action ? [`${action.label}:\n${action.link}`] : []), ...after]
    .concat(`-- \n${SIGNATURE}\n${env.APP_URL}`)
    .join('\n\n')
  const p = (content: string) => `<p style="margin:0 0 16px">${content}</p>`
  const button = action
    ? p(
        `<a href="${escaped(action.link)}" style="display:inline-block;padding:12px 20px;background:#1D2B33;color:#FCFAF4;text-decoration:none;font-weight:600">${escaped(action.label)}</a>`,
      ) + p(`<small style="color:#52606a;word-break:break-all">${escaped(action.link)}</small>`)
    : ''
  const html = `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${escaped(subject)}</title></head>
<body style="margin:0;background:#F6F2E7;color:#1D2B33;font:16px/1.5 'Work Sans',Helvetica,Arial,sans-serif">
<div style="max-width:560px;margin:0 auto;padding:32px 24px">
<p style="margin:0 0 24px;padding-bottom:8px;border-bottom:3px solid #1F6A78;font-weight:700;letter-spacing:.02em">Doab</p>
${p(escaped(greeting))}${paragraphs.map((line) => p(escaped(line))).join('')}${button}${after.map((line) => p(escaped(line))).join('')}
<p style="margin:32px 0 0;padding-top:12px;border-top:1px solid #D8D2C0;color:#52606a;font-size:13px">${SIGNATURE}</p>
</div></body></html>`
  return { subject: oneLine(subject), text, html }
}
