import { formatQuantity } from '../core'
import { BottomAxis } from './AxisLines'
import type { PlaneInput } from './planePicture'
import type { Box } from './plateLayout'
import { axisWriting } from './tickText'

/** The current axis of the plane: units at each decade, or one unit for an even axis. */
export function AxisLines({ input, box }: { input: PlaneInput; box: Box }) {
  const { x, kind } = input
  const writing = axisWriting(x.domain, 'A')
  const even = kind === 'linear'
  return (
    <BottomAxis
      axis={x}
      box={box}
      text={(value) => (even ? writing.text(value) : formatQuantity(value, 'A'))}
      title={even ? `lamp current, ${writing.unit}` : 'lamp current, logarithmic'}
    />
  )
}
