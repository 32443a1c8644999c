import { ACTS, GRADES } from './acts'
import { can } from './decide'

/** The permission table as Markdown: yes, or the status somebody of that grade alone is answered with. */
export function tableAsMarkdown(): string {
  const rows = ACTS.map((act) => {
    const cells = GRADES.map((grade) => {
      const said = can({ grades: [grade] }, act)
      return said.yes ? 'yes' : String(said.status)
    })
    return `| \`${act}\` | ${cells.join(' | ')} |`
  })
  return [`| act | ${GRADES.join(' | ')} |`, `|---|${GRADES.map(() => '---').join('|')}|`, ...rows].join('\n')
}
