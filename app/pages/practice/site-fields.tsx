import type { FieldMetadata } from '@conform-to/react'
import { TextArea, TextField } from '~/ui/form'

type Fields = Record<'name' | 'number' | 'place' | 'client' | 'note', FieldMetadata<string | undefined>>

export function SiteFields({ fields }: { fields: Fields }) {
  return (
    <>
      <TextField meta={fields.name} label="Name" />
      <TextField meta={fields.number} label="Job number" hint="As it stands in your office’s register." />
      <TextField meta={fields.place} label="Place" />
      <TextField meta={fields.client} label="Client" />
      <TextArea meta={fields.note} label="Note" rows={3} />
    </>
  )
}
