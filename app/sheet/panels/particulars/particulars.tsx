import { sameMembers, useSheetState } from '../../shell/use-sheet'
import { Box } from '../box'
import { nameOf, objectWord, type Subject, subjectOf } from '../paths'
import { BankParticulars } from './bank'
import { BodyParticulars } from './body'
import { LineParticulars } from './line'
import { MarkParticulars } from './mark'
import { MaterialParticulars, Materials } from './materials'
import { ObjectParticulars } from './object'
import { SeveralParticulars } from './several'
import { VertexParticulars } from './vertex'
import { SectionParticulars } from './whole'

/** The values of whatever is picked; of the whole section when nothing is. */
export function Particulars() {
  const picked = useSheetState((state) => state.picked, sameMembers)
  const section = useSheetState((state) => state.live.section)
  const [only] = picked
  if (only === undefined)
    return (
      <>
        <Box title="Particulars" remark="whole section">
          <SectionParticulars />
        </Box>
        <Materials />
      </>
    )
  if (picked.length > 1)
    return (
      <Box title="Particulars" remark={`${picked.length} picked`}>
        <SeveralParticulars paths={picked} />
      </Box>
    )
  const subject = subjectOf(only)
  return (
    <Box title="Particulars" remark={remarkOf(subject, nameOf(section, only), section)}>
      <One key={only} subject={subject} path={only} />
    </Box>
  )
}

const remarkOf = (subject: Subject, name: string, section: Parameters<typeof objectWord>[0]) => {
  if (subject.kind !== 'object') return name
  const word = objectWord(section, subject.list, subject.id)
  return name.startsWith(word) ? word : `${word.toLowerCase()} · ${name}`
}

function One({ subject, path }: { subject: Subject; path: string }) {
  switch (subject.kind) {
    case 'section':
      return <SectionParticulars />
    case 'line':
      return <LineParticulars line={subject.line} />
    case 'vertex':
      return <VertexParticulars line={subject.line} vertex={subject.key} />
    case 'bank':
      return <BankParticulars side={subject.side} />
    case 'mark':
      return <MarkParticulars id={subject.id} />
    case 'object':
      if (subject.list === 'bodies') return <BodyParticulars id={subject.id} />
      if (subject.list === 'materials') return <MaterialParticulars id={subject.id} />
      return <ObjectParticulars path={path} list={subject.list} id={subject.id} />
  }
}
