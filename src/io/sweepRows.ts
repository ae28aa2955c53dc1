import type { Delimiter } from './sweepDelimiter'

/** Characters split in one go. */
const block = 400_000

/**
 * The rows of a table as cells, in blocks: the splitter is loaded only when wanted, and gives way
 * to the page between blocks. Quoted cells may hold delimiters and line ends.
 */
export async function* splitRows(
  text: string,
  delimiter: Delimiter,
): AsyncGenerator<readonly (readonly string[])[]> {
  const { default: papa } = await import('papaparse')
  let from = 0
  while (from < text.length) {
    const to = blockEnd(text, from)
    const body = text.slice(from, to).replace(/(?:\r\n|\n|\r)$/, '')
    const tidy =
      delimiter === ' ' ? body.replace(/^[ \t]+|[ \t]+$/gm, '').replace(/[ \t]+/g, '\t') : body
    const { data } = papa.parse<string[]>(tidy, { delimiter: delimiter === ' ' ? '\t' : delimiter })
    yield data.length === 0 ? [['']] : data
    from = to
    if (from < text.length) await giveWay()
  }
}

/** Lets the page do what waits. */
export function giveWay(): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, 0))
}

/** Where a block ends: after a line end that is not within quotes. */
function blockEnd(text: string, from: number): number {
  let end = from + block
  while (end < text.length) {
    const line = text.indexOf('\n', end)
    if (line < 0) break
    end = line + 1
    const quotes = text.slice(from, end).match(/"/g)?.length ?? 0
    if (quotes % 2 === 0) return end
  }
  return text.length
}
