import type { Opened } from '../opened'

/** Reads one format, in both of the shapes it is written in. */
export type FormatReader = {
  /** The shape with named fields, of files and of what the browser keeps. */
  readonly named: (value: unknown) => Opened
  /** The short shape of links. */
  readonly packed: (value: unknown) => Opened
}
