import type { Design } from '../core'

/** What came of opening a link, a file or what the browser kept. */
export type Opened =
  | {
      readonly ok: true
      readonly design: Design
      /** Sentences about what was left out or read differently; often empty. */
      readonly notes: readonly string[]
    }
  | Refused

/** Why there is none: a sentence for anyone, and a finer one for who mends files by hand. */
export type Refused = { readonly ok: false; readonly message: string; readonly detail?: string }

/** A refusal as a result. */
export function refused(message: string, detail?: string): Refused {
  return detail === undefined ? { ok: false, message } : { ok: false, message, detail }
}
