import { base64 } from './base64'

/** Work Sans as woff2 bytes; the caller reads them, since export knows no files. */
export type Fonts = { regular: Uint8Array; semibold: Uint8Array }

/** The text's shape as SVG path data with its origin at 0 0, y down; null where the font lacks a sign. */
export type Outliner = (text: string, size: number, weight: 400 | 500 | 600) => string | null

/** The families that a sheet names; readers without them fall back to their own sans-serif. */
export const FAMILY = {
  sans: "'Work Sans','DejaVu Sans',sans-serif",
  symbols: "'DejaVu Sans','Work Sans',sans-serif",
} as const

/** @font-face rules with the files inside, so that the sheet needs nothing from outside. */
export function fontFaces({ regular, semibold }: Fonts): string {
  const face = (bytes: Uint8Array, weight: string) =>
    `@font-face{font-family:'Work Sans';font-weight:${weight};src:url(data:font/woff2;base64,${base64(bytes)}) format('woff2')}`
  return face(regular, '400') + face(semibold, '500 600')
}
