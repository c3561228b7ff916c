/** A bare word or a unit, where a function takes one: `R40`, `HEB300`, `mm`. */
import { binding, upright, type Drawn } from './drawn'
import { uprightTex } from './safe'
import { drawUnit } from './unit'

export const drawWord = (text: string): Drawn => ({
  tex: uprightTex(text),
  print: upright(text),
  speech: text,
  binding: binding.atom,
  height: 1,
  first: 'other',
  last: 'other',
})

export const drawBareUnit = (text: string): Drawn => ({
  ...drawUnit(text),
  binding: binding.quantity,
  height: 1,
  first: 'other',
  last: 'unit',
})
