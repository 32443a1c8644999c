/** Until the fonts are there a canvas would paint with others, and it is not painted again by itself. */
export async function loadFonts(): Promise<void> {
  if (!document.fonts) return
  const wanted = [400, 500, 600].map((weight) => `${weight} 12px "Work Sans"`)
  // A font that cannot be fetched leaves its stand-in.
  await Promise.allSettled([...wanted, '400 12px "DejaVu Sans"'].map((font) => document.fonts.load(font)))
}
