import type { Dimension, Quantity } from '../contracts'
import { formatQuantity } from '../display/number'
import type { UnitPhrase } from '../parse/expression'
import { fromSI } from '../units/unit'

/** An SI number with its display unit, shown to `digits` significant digits. */
export const quantityOf = (si: number, dimension: Dimension, unit: UnitPhrase, digits: number): Quantity => {
  const number = fromSI(si, unit)
  return { si, dimension, unit: unit.text, number, shown: formatQuantity(number, unit.text, digits) }
}

/** The same, with the number as it was typed: 60.0 stays 60.0. */
export const quantityAsTyped = (
  si: number,
  dimension: Dimension,
  unit: UnitPhrase,
  number: number,
  typed: string,
): Quantity => ({
  si,
  dimension,
  unit: unit.text,
  number,
  shown: unit.text === '' ? typed : `${typed} ${unit.text}`,
})
