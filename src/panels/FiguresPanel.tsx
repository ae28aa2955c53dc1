import { useMemo } from 'react'
import { useSolution } from './useSolution'
import { figureGroups } from './words/figureRows'

/** The figures of the cycle, or of the rests, each explained on request. */
export function FiguresPanel() {
  const { stage, solution } = useSolution()
  const groups = useMemo(() => figureGroups(stage, solution), [stage, solution])
  if (groups.length === 0) {
    return (
      <p className="nothing">
        There is no cycle and no rest within the characteristic, so there are no figures.
      </p>
    )
  }
  return (
    <div className="figures">
      {groups.map((group) => (
        <section key={group.title} aria-label={group.title}>
          <h3>{group.title}</h3>
          {group.rows.map((row) => (
            <details key={row.name}>
              <summary>
                <span>{row.name}</span>
                <strong>{row.value}</strong>
              </summary>
              <p>{row.meaning}</p>
            </details>
          ))}
        </section>
      ))}
    </div>
  )
}
