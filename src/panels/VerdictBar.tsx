import { type Ref, useMemo } from 'react'
import { LampGlyph } from '../chart/LampGlyph'
import { cautionsFor } from '../core'
import { useSolution } from './useSolution'
import { cautionWords, mainsCaution } from './words/cautionWords'
import { verdictWords } from './words/verdictWords'

/** The verdict in one sentence, readable at arm's length, and the cautions that go with the stage. */
export function VerdictBar({ glow }: { glow: Ref<SVGGElement> }) {
  const { stage, solution, sentences, fault } = useSolution()
  const words = useMemo(() => verdictWords(stage, solution), [stage, solution])
  const cautions = useMemo(() => cautionsFor(stage), [stage])
  return (
    <section className="verdict-bar" aria-label="Verdict and cautions">
      <div className="verdict">
        <LampGlyph glow={glow} size={64} />
        <div>
          <h2 aria-live="polite" data-verdict={solution.verdict}>
            <strong>{words.verdict}</strong>
            {words.sentence}
          </h2>
          <p className="advice">{words.advice}</p>
          {(sentences.length > 0 || fault !== null) && (
            <p className="advice conditions">
              {fault ?? `Under the conditions set: ${sentences.join(' ')}`}
            </p>
          )}
        </div>
      </div>
      {cautions.length > 0 && (
        <aside className="cautions" aria-label="Cautions">
          <ul>
            {cautions.map((caution) => {
              const { text, source } = cautionWords(caution)
              return (
                <li key={caution.kind} title={`Limit: ${source}`}>
                  {text}
                </li>
              )
            })}
            <li>{mainsCaution}</li>
          </ul>
        </aside>
      )}
    </section>
  )
}
