/** The mark: two waters and the tongue of land between them. */
export function Brand({ size = 28 }: { size?: number }) {
  return (
    <svg viewBox="0 0 28 34" width={(size * 28) / 34} height={size} aria-hidden="true">
      <path
        d="M2 2c4 12 7 18 12 24c5-6 8-12 12-24M14 26v6"
        fill="none"
        stroke="var(--water)"
        strokeWidth="3.2"
        strokeLinecap="round"
        strokeLinejoin="round"
      />
      <path d="M7 3q7 5 14 0l-7 14Z" fill="var(--land)" />
    </svg>
  )
}
