/** Saves a text as a file of the given name and kind. */
export function saveText(name: string, text: string, kind: string): void {
  const address = URL.createObjectURL(new Blob([text], { type: kind }))
  const anchor = document.createElement('a')
  anchor.href = address
  anchor.download = name
  anchor.click()
  window.setTimeout(() => URL.revokeObjectURL(address), 10_000)
}
