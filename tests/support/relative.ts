import { expect } from 'vitest'

/** Equal to within `tolerance` of the expected value; the tolerance is the source's, not ours. */
export const expectRelative = (found: number | undefined, expected: number, tolerance: number): void => {
  if (found === undefined) throw new Error(`There is no value; ${expected} was expected.`)
  expect(Math.abs(found - expected) / Math.abs(expected), `${found} against ${expected}`).toBeLessThanOrEqual(
    tolerance,
  )
}
