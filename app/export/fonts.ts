import { base64 } from './xml'

/** A font file that the caller read (export is pure): Work Sans of one weight, woff2 or woff. */
export type FontFile = { weight: 400 | 500 | 600; format: 'woff2' | 'woff'; bytes: Uint8Array }

/** The text's shape as SVG path data with its origin at 0 0, y down; null where the font lacks a sign. */
export type Outliner = (text: string, size: number, weight: 400 | 500 | 600) => string | null

/** The families that a sheet names; readers without them fall back to their own sans-serif. */
export const FAMILY = {
  sans: "'Work Sans','DejaVu Sans',sans-serif",
  symbols: "'DejaVu Sans','Work Sans',sans-serif",
} as const

/** @font-face rules with the files inside, so that the sheet needs nothing from outside. */
export function fontFaces(files: readonly FontFile[]): string {
  return files
    .map(
      ({ weight, format, bytes }) =>
        `@font-face{font-family:'Work Sans';font-weight:${weight};src:url(data:font/${format};base64,${base64(bytes)}) format('${format}')}`,
    )
    .join('')
}
