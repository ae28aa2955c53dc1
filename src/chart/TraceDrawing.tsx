import { BottomAxis, LeftAxis } from './AxisLines'
import type { Axis } from './axes'
import { type Box, bottomOf, rightOf } from './plateLayout'
import { axisWriting } from './tickText'
import type { TracePicture } from './tracePicture'

/** Capacitor voltage above, lamp current and light below, on one time axis. */
export function TraceDrawing(props: {
  picture: TracePicture
  time: Axis
  current: Axis
  traceBox: Box
  currentBox: Box
}) {
  const { picture, time, current, traceBox, currentBox } = props
  const seconds = axisWriting(time.domain, 's')
  const amps = axisWriting(current.domain, 'A')
  return (
    <g>
      <BottomAxis
        axis={time}
        box={currentBox}
        through={traceBox}
        text={seconds.text}
        title={`time, ${seconds.unit}`}
      />
      <line
        className="rule"
        x1={traceBox.x}
        x2={rightOf(traceBox)}
        y1={bottomOf(traceBox)}
        y2={bottomOf(traceBox)}
      />
      <LeftAxis
        axis={current}
        box={currentBox}
        text={amps.text}
        title={`lamp current and light, ${amps.unit}`}
      />
      <g clipPath="url(#trace-clip)">
        <path className="wave" d={picture.voltage} />
      </g>
      <g clipPath="url(#current-clip)">
        <path className="light" d={picture.light} />
        <path className="wave-current" d={picture.current} />
      </g>
    </g>
  )
}
