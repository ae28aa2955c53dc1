const mostNamed = 4

/**
 * Names of the fields that `given` has and `known` has not, at any depth `known` reaches, quoted
 * for a sentence. Long lists end in "and more".
 */
export function unknownFields(given: unknown, known: unknown): string[] {
  const found = [...new Set(collect(given, known, ''))]
  const named = found.slice(0, mostNamed).map((name) => `“${name.slice(0, 40)}”`)
  return found.length > mostNamed ? [...named, 'and more'] : named
}

function collect(given: unknown, known: unknown, before: string): string[] {
  if (typeof given !== 'object' || given === null) return []
  if (typeof known !== 'object' || known === null) return []
  if (Array.isArray(given) && Array.isArray(known)) {
    return given.flatMap((item, i) => collect(item, known[i], before))
  }
  return Object.entries(given).flatMap(([key, value]) =>
    Object.hasOwn(known, key)
      ? collect(value, (known as Readonly<Record<string, unknown>>)[key], `${before}${key}.`)
      : [before + key],
  )
}
