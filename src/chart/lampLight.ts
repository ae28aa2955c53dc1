/** Most flashes a second shown on screen [WCAG 2.3.1]. */
export const mostFlashesPerSecond = 3

/** Longest stretch of time one frame moves the marker by on screen, s (`usePlayback` lets it wait after that). */
const longestFrame = 0.1

/**
 * Flashes a second up to which the lamp flashes on screen: a flash can show one frame late and the third after
 * it in time, and even then no second may hold four.
 */
const mostShown = mostFlashesPerSecond / (1 + longestFrame)

/** How long a shown flash takes to fade to about a third, s: long enough to be seen at all. */
const fadeTime = 0.14

/**
 * Brightness of the lamp drawn on the page, 0 … 1, `elapsed` screen seconds after it was `before`. A lamp
 * that could flash more often than three times in a second on screen shines steadily and dimly instead.
 *
 * @param lit whether the stage's lamp was lit at any time since.
 * @param flashesOnScreen flashes in a second on screen; 0 = it does not flash.
 */
export function shownBrightness(
  before: number,
  lit: boolean,
  elapsed: number,
  flashesOnScreen: number,
): number {
  if (flashesOnScreen > mostShown) return 0.55
  if (lit) return 1
  const left = before * Math.exp(-elapsed / fadeTime)
  return left < 0.01 ? 0 : left
}

/** Rise in brightness that counts as a flash: a tenth and more of full brightness [WCAG, general flash]. */
const leastFlash = 0.1

/** Whether going from one brightness to another is the beginning of a flash. */
export function isRise(before: number, next: number): boolean {
  return next - before >= leastFlash
}

/**
 * The brightness wanted, unless that would begin another flash too soon: then the one before. Whatever a hand on
 * the load line does, no second holds more than three.
 *
 * @param sinceRise s since the last flash began.
 */
export function heldBack(before: number, wanted: number, sinceRise: number): number {
  return isRise(before, wanted) && sinceRise < 1 / mostShown ? before : wanted
}
