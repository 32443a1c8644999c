import { keyHelp } from '../commands'

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
        </>
      ) : null}
      {keyHelp(may).map(({ title, rows }) => (
        <div key={title}>
          <h3>{title}</h3>
          <dl className="key-list">
            {rows.map(({ keys, label }) => (
              <div key={label}>
                <dt>{keys}</dt>
                <dd>{label}</dd>
              </div>
            ))}
          </dl>
        </div>
      ))}
      <h3>What the numbers mean</h3>
      <p className="quiet">
        The water table is a screening estimate: flow is taken as horizontal, the ground as uniform along the bank. Look
        at Footing before you rely on it, and at the ground before you dig.
      </p>
    </section>
  )
}
