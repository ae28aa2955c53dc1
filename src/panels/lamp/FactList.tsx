import type { LampFact } from '../../core'

/** Facts, each with who says so. */
export function FactList({ facts }: { facts: readonly LampFact[] }) {
  if (facts.length === 0) return <p className="hint">Nothing is known besides its figures.</p>
  return (
    <dl className="facts">
      {facts.map((fact) => (
        <div key={fact.label} className={fact.guessed ? 'guessed' : ''}>
          <dt>{fact.label}</dt>
          <dd>
            <strong>{fact.value}</strong>
            {fact.guessed && ' (guessed)'}
            <span className="source">{fact.source}</span>
          </dd>
        </div>
      ))}
    </dl>
  )
}
