import { directionIn, isComment, voltageIn } from './sweepCells'

/** What stands between the columns of a table. */
export type Delimiter = '\t' | ';' | ',' | ' '

/** Lines looked at. */
const sampled = 60

/**
 * The delimiter with which most lines come out as columns of numbers; of equals the first of tab,
 * semicolon, comma and spaces. So `10,5;9,8` has semicolons and decimal commas, and `10,5` with
 * spaces after it has spaces.
 */
export function guessDelimiter(text: string): Delimiter {
  const lines = text
    .slice(0, 20_000)
    .split(/\r\n|\n|\r/, sampled)
    .filter((line) => line.trim() !== '' && !isComment([line]))
  let best: Delimiter = ','
  let most = 0
  for (const delimiter of ['\t', ';', ',', ' '] as const) {
    const score = lines.reduce((sum, line) => sum + scoreOf(cellsOf(line, delimiter)), 0)
    if (score > most) {
      best = delimiter
      most = score
    }
  }
  return best
}

function cellsOf(line: string, delimiter: Delimiter): readonly string[] {
  if (delimiter === ' ') return line.trim().split(/\s+/)
  // Quoted cells are few; for a guess it is enough that a quoted decimal comma splits nothing.
  const bare = line.replace(/"([^"]*)"/g, (_, inner: string) => inner.replaceAll(delimiter, '.'))
  return bare.split(delimiter)
}

/** Two numbers are good; nothing besides numbers, directions and gaps is better. */
function scoreOf(cells: readonly string[]): number {
  const numbers = cells.filter((cell) => voltageIn(cell, 1) !== null).length
  if (numbers < 2) return 0
  const known = cells.every(
    (cell) => cell.trim() === '' || voltageIn(cell, 1) !== null || directionIn(cell) !== null,
  )
  return known ? 3 : 1
}
