import type { FigureFrame } from '@shared/engine/contracts'
import { quantityText } from '@/editor/symbolText'
import { formatQuantity } from '@shared/engine/display/number'
import { fromSI, readUnit } from '@shared/engine/units/unit'

/** Shows SI numbers in the unit that a figure proposes for the sheet's system of units. */
export const showIn =
  (unitSystem: 'SI' | 'US'): FigureFrame['show'] =>
  (si, _dimension, unit) => {
    const { phrase } = readUnit(unit[unitSystem])
    return quantityText(
      phrase ? formatQuantity(fromSI(si, phrase), unit[unitSystem]) : formatQuantity(si, ''),
    )
  }
