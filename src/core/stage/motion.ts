import { type Branches, currentOn, pieceAt } from './branches'
import {
  landingAbove,
  landingBelow,
  recoveryCapacitance,
  recoveryFloor,
  topLevel,
  valleyLevel,
} from './landing'
import { type LoadLine, loadCurrent } from './loadLine'
import { type Phase, timeBetween } from './phase'
import { meetingTime } from './recovery'

/** A load line with what sets the pace: the capacitor and the lamp's two times. */
export type Pace = {
  readonly line: LoadLine
  /** F; more than zero. */
  readonly capacitance: number
  /** s */
  readonly recoveryTime: number
  /** The wait before each strike, s, asked for anew each time; null = none, ever. */
  readonly wait: (() => number) | null
}

/** What motion writes down on its way, if asked to. */
export type Trail = {
  readonly phases: Phase[]
  /** Number of phases before the first strike; −1 = it has not struck. */
  firstStrike: number
  /** Number of phases before the extinction at which the cycle closes on itself; −1 = no cycle. */
  cycleStart: number
}

/** How the motion ends. */
export type Fate = {
  readonly kind: 'rest' | 'cycle' | 'over range' | 'held'
  /** Lamp current of the rest, or of the last known point, A. */
  readonly current: number
  /** Capacitor voltage there, V. */
  readonly level: number
  /** Branch of the rest, of the last strike tried, or of the valley where the cycle closes. */
  readonly branch: number
}

/** Where motion begins: on a branch at a capacitor voltage, the lamp rested. */
export type Beginning = { readonly branch: number; readonly level: number }

const switchOn: Beginning = { branch: 0, level: 0 }

const forEver = Number.POSITIVE_INFINITY

/** The circuit on its way round the characteristic. */
class Motion {
  private branch: number
  private piece: number
  private level: number
  private current: number
  /** Branch at whose valley the lamp has just gone out; −1 = rested. */
  private extinguished = -1
  private readonly link: number

  constructor(
    private readonly path: Branches,
    private readonly pace: Pace,
    private readonly trail: Trail | null,
    beginning: Beginning,
  ) {
    this.link = 1 / pace.line.resistance + pace.line.leakage
    this.branch = beginning.branch
    this.level = beginning.level
    this.piece = pieceAt(path, this.branch, this.level)
    this.current = currentOn(path, this.piece, this.level)
  }

  run(): Fate {
    const valleys: number[] = []
    const starts: number[] = []
    for (;;) {
      if (this.spare(this.level) >= this.current) {
        const end = this.mustRecover() ? this.chargeWhileRecovering() : this.charge()
        if (end !== null) return end
        this.wait()
        const lands = landingAbove(this.path, this.branch, this.level)
        if (lands < 0)
          return this.fate('over range', this.path.current.at(-1) as number, this.level)
        this.land(lands)
        this.extinguished = -1
      } else {
        const end = this.discharge()
        if (end !== null) return end
        const seen = valleys.indexOf(this.branch)
        if (seen >= 0) {
          if (this.trail !== null) this.trail.cycleStart = starts[seen] as number
          return this.fate('cycle', this.current, this.level)
        }
        valleys.push(this.branch)
        starts.push(this.trail === null ? 0 : this.trail.phases.length)
        this.extinguished = this.branch
        this.land(landingBelow(this.path, this.branch))
      }
    }
  }

  private spare(level: number): number {
    return loadCurrent(this.pace.line, level)
  }

  private fate(kind: Fate['kind'], current: number, level: number): Fate {
    return { kind, current, level, branch: this.branch }
  }

  private land(branch: number): void {
    this.branch = branch
    this.piece = pieceAt(this.path, branch, this.level)
    this.current = currentOn(this.path, this.piece, this.level)
  }

  private mustRecover(): boolean {
    return (
      this.extinguished >= 0 && this.pace.recoveryTime > 0 && this.branch + 1 < this.path.top.length
    )
  }

  /** Up the branch, the lamp rested: to a rest, or to its top (then null). */
  private charge(): Fate | null {
    const { level, current } = this.path
    const top = this.path.top[this.branch] as number
    const rests = this.spare(level[top] as number) <= (current[top] as number)
    while (this.piece < top) {
      const high = level[this.piece + 1] as number
      if (rests && this.spare(high) <= (current[this.piece + 1] as number)) return this.rest()
      this.pass(high)
      this.piece++
    }
    this.current = current[top] as number
    return null
  }

  /** Up the branch after extinction: to a rest, or to where the strike voltage is met (then null). */
  private chargeWhileRecovering(): Fate | null {
    const { path, pace, extinguished } = this
    const { level, current } = path
    const top = path.top[this.branch] as number
    const least = recoveryCapacitance(path, pace.line, pace.recoveryTime, extinguished, this.branch)
    if (least > 0 && pace.capacitance <= least) return this.hold()
    const recovery = {
      low: recoveryFloor(path, extinguished, this.branch),
      high: topLevel(path, this.branch),
      time: pace.recoveryTime,
    }
    let clock = 0
    while (this.piece < top) {
      const low = level[this.piece] as number
      const high = level[this.piece + 1] as number
      const rests = this.spare(high) <= (current[this.piece + 1] as number)
      if (high > low) {
        const { toward, timeConstant, conductance } = this.pull()
        const from = this.level
        const duration = rests
          ? forEver
          : timeBetween(timeConstant, this.ahead(high, conductance), from, high)
        const met = meetingTime(recovery, { start: clock, duration, from, toward, timeConstant })
        if (met !== null) {
          const risen = (toward - from) * -Math.expm1(-(met - clock) / timeConstant)
          this.pass(Math.min(high, from + risen), met - clock)
          // A swing that rounding swallows is none: the lamp does not let go.
          if (this.level === valleyLevel(path, extinguished)) return this.hold()
          this.current = currentOn(path, this.piece, this.level)
          return null
        }
        clock += duration
        if (high === recovery.high && !rests) {
          // The strike voltage is still short of its full height, be it by less than rounding shows, so a
          // flat knee is not entered.
          this.pass(high)
          this.current = current[this.piece + 1] as number
          return null
        }
      }
      if (rests) return this.rest()
      this.pass(high)
      this.piece++
    }
    this.current = current[top] as number
    return null
  }

  /** At strike voltage: the random wait, during which the lamp takes no more than its pre-strike current. */
  private wait(): void {
    const { pace, trail, level: from, current: anchorCurrent } = this
    const duration = pace.wait === null ? 0 : pace.wait()
    if (duration > 0) {
      const timeConstant = pace.capacitance / this.link
      const toward = from + (this.spare(from) - anchorCurrent) / this.link
      this.level = from + (toward - from) * -Math.expm1(-duration / timeConstant)
      trail?.phases.push({
        kind: 'waiting',
        duration,
        from,
        to: this.level,
        toward,
        timeConstant,
        anchorCurrent,
        anchorLevel: from,
        conductance: 0,
      })
    }
    if (trail !== null && trail.firstStrike < 0) trail.firstStrike = trail.phases.length
  }

  /** Down the branch: to a rest, or to its valley (then null). */
  private discharge(): Fate | null {
    const { level, current } = this.path
    const bottom = this.path.bottom[this.branch] as number
    const rests = this.spare(level[bottom] as number) >= (current[bottom] as number)
    for (;;) {
      const low = level[this.piece] as number
      if (rests && this.spare(low) >= (current[this.piece] as number)) return this.rest()
      this.pass(low)
      if (this.piece === bottom) break
      this.piece--
    }
    this.current = current[bottom] as number
    return null
  }

  /** The exponential that the voltage follows on the present, rising piece. */
  private pull(): { toward: number; timeConstant: number; conductance: number } {
    const low = this.path.level[this.piece] as number
    const left = this.path.current[this.piece] as number
    const conductance =
      ((this.path.current[this.piece + 1] as number) - left) /
      ((this.path.level[this.piece + 1] as number) - low)
    const slope = this.link + conductance
    return {
      toward: low + (this.spare(low) - left) / slope,
      timeConstant: this.pace.capacitance / slope,
      conductance,
    }
  }

  /** How far the voltage would still go beyond an end of the present, rising piece, V. */
  private ahead(end: number, conductance: number): number {
    const { level, current } = this.path
    const knot = this.piece + (end === level[this.piece + 1] ? 1 : 0)
    return (this.spare(end) - (current[knot] as number)) / (this.link + conductance)
  }

  /**
   * Moves on the present piece to `to`: to one of its ends, or anywhere where the time it takes is known.
   * A flat piece is passed in no time.
   */
  private pass(to: number, known?: number): void {
    if (this.trail !== null && to !== this.level) {
      const { toward, timeConstant, conductance } = this.pull()
      const ahead = known === undefined ? this.ahead(to, conductance) : 0
      this.trail.phases.push({
        kind: this.piece < this.path.firstGlowPiece ? 'dark' : 'glow',
        duration: known ?? timeBetween(timeConstant, ahead, this.level, to),
        from: this.level,
        to,
        toward: known === undefined ? to + ahead : toward,
        timeConstant,
        anchorCurrent: this.path.current[this.piece] as number,
        anchorLevel: this.path.level[this.piece] as number,
        conductance,
      })
    }
    this.level = to
  }

  /** Comes to rest on the present piece, where the load line crosses it. */
  private rest(): Fate {
    const { level, current } = this.path
    const low = level[this.piece] as number
    const high = level[this.piece + 1] as number
    const left = current[this.piece] as number
    const right = current[this.piece + 1] as number
    const below = this.spare(low) - left
    const above = this.spare(high) - right
    const part = below > above ? below / (below - above) : 0
    const at = this.fate('rest', left + part * (right - left), low + part * (high - low))
    const kind = this.piece < this.path.firstGlowPiece ? 'dark' : 'glow'
    this.approach(kind, at.current, at.level, high > low ? this.pull() : null)
    return at
  }

  /** Cannot recover: stays where it would have gone out, passing all that the load line leaves. */
  private hold(): Fate {
    const current = this.spare(this.level)
    this.approach('held', current, this.level, null)
    return { kind: 'held', current, level: this.level, branch: this.extinguished }
  }

  /** Writes down the last phase, which never ends. */
  private approach(
    kind: Phase['kind'],
    current: number,
    level: number,
    pull: { timeConstant: number; conductance: number } | null,
  ): void {
    this.trail?.phases.push({
      kind,
      duration: forEver,
      from: pull === null ? level : this.level,
      to: level,
      toward: level,
      timeConstant: pull?.timeConstant ?? this.pace.capacitance / this.link,
      anchorCurrent: current,
      anchorLevel: level,
      conductance: pull?.conductance ?? 0,
    })
  }
}

/**
 * Follows the circuit from a beginning (switch-on with the capacitor empty, unless told otherwise) to its
 * fate: a rest, a closed cycle, or off the end of the characteristic. On each straight piece the voltage is
 * one exponential and the time one logarithm, so there are no time steps. The state just after going out at
 * a valley is known whole, so meeting the same valley twice is a cycle, exactly.
 *
 * @param trail filled with the phases passed through; null spares the work where only the fate is wanted.
 */
export function follow(
  path: Branches,
  pace: Pace,
  trail: Trail | null,
  beginning: Beginning = switchOn,
): Fate {
  return new Motion(path, pace, trail, beginning).run()
}
