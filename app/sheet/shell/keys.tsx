import { TOOL_GROUPS } from './tools'

const ALWAYS: [keys: string, does: string][] = [
  ['Ctrl Z · Ctrl Shift Z', 'undo, redo: your own steps only'],
  ['arrows · Shift arrows', 'nudge what is picked, finely or by ten'],
  ['Delete', 'remove what is picked'],
  ['Ctrl C · Ctrl V', 'copy, paste, between sections too'],
  ['Esc', 'leave the tool, let go of what is picked'],
  ['0 · + · −', 'whole strip, nearer, farther'],
  ['Space and drag', 'move the sheet'],
]

/** Help: what each key does, and how values are typed. */
export function Keys({ may }: { may: 'write' | 'read' }) {
  return (
    <section className="keys" aria-label="Help">
      {may === 'write' ? (
        <>
          <h3>Values</h3>
          <p className="quiet">
            Type a value with its unit: <code>2e-4 cm/s</code>, <code>300 mm/yr</code>, <code>= 0.35*820 mm/yr</code>.
            Enter keeps it, Esc takes it back, the arrows step it. A bare number is in the unit shown.
          </p>
          <h3>Tools</h3>
          <dl className="key-list tools">
            {TOOL_GROUPS.flat().map(({ tool, key, label }) => (
              <div key={tool}>
                <dt>
                  <kbd>{key}</kbd>
                </dt>
                <dd>{label}</dd>
              </div>
            ))}
          </dl>
          <h3>Keys</h3>
          <dl className="key-list">
            {ALWAYS.map(([keys, does]) => (
              <div key={keys}>
                <dt>{keys}</dt>
                <dd>{does}</dd>
              </div>
            ))}
          </dl>
        </>
      ) : null}
      <h3>What the numbers mean</h3>
      <p className="quiet">
        The water table is a screening estimate: flow is taken as horizontal, the ground as uniform along the bank. Look
        at Footing before you rely on it, and at the ground before you dig.
      </p>
    </section>
  )
}
