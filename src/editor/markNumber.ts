/** A number in a ring, as drawings number their dimension marks: ① to ⑳. */
export const markNumber = (mark: number): string =>
  mark >= 1 && mark <= 20 ? String.fromCodePoint(0x245f + mark) : `(${mark})`
