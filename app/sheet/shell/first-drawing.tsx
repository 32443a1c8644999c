import { memo } from 'react'

/** The drawing as the server made it. Its text is escaped by the exporter, and nothing in it runs. */
export const FirstDrawing = memo(function FirstDrawing({ svg }: { svg: string }) {
  return (
    <div
      className="first-drawing"
      role="img"
      aria-label="The section with its water table"
      // biome-ignore lint/security/noDangerouslySetInnerHtml: made by app/export from parsed values, never by a person
      dangerouslySetInnerHTML={{ __html: svg }}
    />
  )
})
