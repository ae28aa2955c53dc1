import { formatQuantity, type Stage } from '../core'

/** The parts of the drawn circuit that have a value to type. */
export type CircuitPart =
  | 'supplyVoltage'
  | 'sourceResistance'
  | 'seriesResistance'
  | 'capacitance'
  | 'leakageResistance'
  | 'leadResistance'

const rail = 46
const ground = 168

/** The stage as a circuit with its values on it; a part clicked is a part to edit. */
export function CircuitDrawing(props: {
  stage: Stage
  lampName: string
  onPart: (part: CircuitPart) => void
}) {
  const { stage, onPart } = props
  const ohms = (value: number) => formatQuantity(value, 'Ω')
  const hasSource = stage.sourceResistance > 0
  const hasLeak = Number.isFinite(stage.leakageResistance)
  const hasLead = stage.leadResistance > 0
  const hasCapacitor = stage.capacitance > 0
  const part = (name: CircuitPart) => ({
    className: 'part',
    'data-part': name,
    onClick: () => onPart(name),
  })
  return (
    <svg className="circuit" viewBox="0 0 340 196" role="img" aria-label={circuitInWords(stage)}>
      <path
        className="wire"
        d={`M24 ${rail}H${hasSource ? 40 : 92}M${hasSource ? 72 : 92} ${rail}H92M150 ${rail}H308V${hasLead ? 60 : 106}M308 140V${ground}H24V118M24 92V${rail}`}
      />
      <g {...part('supplyVoltage')}>
        <rect className="part-target" x="2" y="84" width="92" height="42" />
        <path className="symbol thick" d="M12 92H36M12 110H36" />
        <path className="symbol" d="M17 101H31M17 118H31" />
        <text x="44" y="109">
          {formatQuantity(stage.supplyVoltage, 'V')}
        </text>
        <text className="sign" x="36" y="86">
          +
        </text>
      </g>
      {hasSource && (
        <g {...part('sourceResistance')}>
          <rect className="symbol soft" x="40" y={rail - 6} width="32" height="12" />
          <text className="soft" x="56" y={rail - 13} textAnchor="middle">
            {ohms(stage.sourceResistance)}
          </text>
        </g>
      )}
      <g {...part('seriesResistance')}>
        <rect className="part-target" x="88" y={rail - 32} width="66" height="46" />
        <rect className="symbol" x="92" y={rail - 8} width="58" height="16" />
        <text x="121" y={rail - 15} textAnchor="middle">
          {ohms(stage.seriesResistance)}
        </text>
      </g>
      {hasLeak && (
        <g {...part('leakageResistance')}>
          <path className="wire dashed" d={`M176 ${rail}V80M176 134V${ground}`} />
          <rect className="symbol dashed" x="169" y="80" width="14" height="54" />
          <text className="soft" x="163" y="111" textAnchor="end">
            {ohms(stage.leakageResistance)}
          </text>
        </g>
      )}
      <g {...part('capacitance')}>
        <rect className="part-target" x="196" y="80" width="84" height="54" />
        <path
          className={hasCapacitor ? 'wire' : 'wire dashed'}
          d={`M216 ${rail}V102M216 112V${ground}`}
        />
        <path
          className={hasCapacitor ? 'symbol thick' : 'symbol dashed'}
          d="M202 102H230M202 112H230"
        />
        <text x="236" y="111">
          {hasCapacitor ? formatQuantity(stage.capacitance, 'F') : 'none'}
        </text>
      </g>
      {hasLead && (
        <g {...part('leadResistance')}>
          <path className="wire" d="M308 94V106" />
          <rect className="symbol" x="302" y="60" width="12" height="34" />
          <text x="296" y="81" textAnchor="end">
            {ohms(stage.leadResistance)}
          </text>
        </g>
      )}
      <g className="circuit-lamp">
        <circle cx="308" cy="123" r="17" />
        <path d="M308 106V116M299 116H317M308 140V130M299 130H317" />
        <circle className="gas" cx="317" cy="123" r="1.8" />
      </g>
      <circle className="node" cx="216" cy={rail} r="2.6" />
      <circle className="node" cx="216" cy={ground} r="2.6" />
      {hasLeak && (
        <>
          <circle className="node" cx="176" cy={rail} r="2.6" />
          <circle className="node" cx="176" cy={ground} r="2.6" />
        </>
      )}
      <text className="lamp-name" x="330" y="188" textAnchor="end">
        {props.lampName}
      </text>
    </svg>
  )
}

/** The circuit in a sentence, for those who cannot see it. */
function circuitInWords(stage: Stage): string {
  const ohms = (value: number) => formatQuantity(value, 'Ω')
  const words = [
    `Circuit: a supply of ${formatQuantity(stage.supplyVoltage, 'V')}`,
    stage.sourceResistance > 0 ? ` with ${ohms(stage.sourceResistance)} of its own` : '',
    ` feeds the lamp through ${ohms(stage.seriesResistance)}`,
    stage.leadResistance > 0 ? ` and ${ohms(stage.leadResistance)} in its lead` : '',
    stage.capacitance > 0
      ? `, with ${formatQuantity(stage.capacitance, 'F')} across it`
      : ', with no capacitor',
    Number.isFinite(stage.leakageResistance)
      ? ` that leaks through ${ohms(stage.leakageResistance)}`
      : '',
  ]
  return `${words.join('')}.`
}
