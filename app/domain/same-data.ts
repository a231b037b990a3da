/** Equality by value of plain data: numbers, strings, null, arrays and objects of them, whatever order their keys are in. */
export function sameData(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false
  const [keysOfA, keysOfB] = [Object.keys(a), Object.keys(b)]
  return (
    keysOfA.length === keysOfB.length &&
    keysOfA.every((key) => sameData(Reflect.get(a, key) ?? null, Reflect.get(b, key) ?? null))
  )
}
