import { type KeptLamp, newLampId } from '../../io/lampStore'
import { browserLampStore } from '../../io/lampStoreBrowser'
import { readLampFile, writeLampFile } from '../../io/lampStoreFile'
import { mergeLamps } from '../../io/lampStoreNames'
import { lampKeeper } from '../../state/myLamps'

/** Keeps one's own lamps in this browser. */
export const keeper = lampKeeper(browserLampStore(), newLampId)

/** All lamps as the text of one file. */
export const lampsFileText = writeLampFile

const mostBytes = 64_000_000

/** Adds the lamps of a file to those there are; says what came of it. */
export async function mergeLampFile(file: File, own: readonly KeptLamp[]): Promise<string> {
  if (file.size > mostBytes) return 'This file is far larger than a file of lamps can be.'
  const opened = readLampFile(await file.text())
  if (!opened.ok) return opened.message
  const merged = mergeLamps(own, opened.lamps)
  const kept = await keeper.replaceAll(merged.lamps)
  const said = [
    `${merged.added} ${merged.added === 1 ? 'lamp' : 'lamps'} added${kept ? '' : ', but not kept'}.`,
  ]
  if (merged.alreadyThere > 0) said.push(`${merged.alreadyThere} were there already.`)
  for (const { from, to } of merged.renamed) said.push(`“${from}” is now “${to}”.`)
  return [...said, ...opened.notes].join(' ')
}
