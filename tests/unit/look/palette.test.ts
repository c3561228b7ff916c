import { readFileSync } from 'node:fs'
import { describe, expect, test } from 'vitest'
import { readPalettes, type Appearance } from '@/styles/palette'
import { contrast, luminance } from './contrast'

const palettes = readPalettes(readFileSync('src/styles/tokens.css', 'utf8'))
const appearances: Appearance[] = ['light', 'night']

const grounds = ['desk', 'paper', 'leaf']
const texts = ['ink', 'ink-2', 'ink-3', 'pencil', 'blue', 'verdigris', 'madder', 'ochre']
const pens = ['plum', 'petrol', 'olive', 'walnut', 'violet', 'rose'].map((pen) => `pen-${pen}`)
const marks = ['rule', 'verdigris-mark', 'ochre-mark', 'madder-mark']
const tinted = ['blue', 'verdigris', 'madder', 'ochre']
const contours = Array.from({ length: 9 }, (_, index) => `contour-${index + 1}`)

/** Pairs that are read as text, `[colour, ground]`. */
const textPairs = [
  ...[...texts, ...pens].flatMap((text) => grounds.map((ground) => [text, ground])),
  ...tinted.flatMap((name) => ['ink', name].map((text) => [text, `${name}-tint`])),
  // A filled button, and the message at the window's foot.
  ['paper', 'blue'],
  ['paper', 'ink'],
] as [string, string][]

/** Pairs of a mark or a border and what it is drawn on; the mark of an ochre line stands on paper and leaf. */
const markPairs = marks.flatMap((mark) => grounds.map((ground) => [mark, ground])) as [string, string][]

describe.each(appearances)('palette, %s', (appearance) => {
  const colour = (name: string): string => {
    const hex = palettes[appearance][name]
    if (!hex) throw new Error(`tokens.css has no colour --${name} for ${appearance}`)
    return hex
  }

  test.each(textPairs)('%s can be read on %s', (text, ground) => {
    expect(contrast(colour(text), colour(ground))).toBeGreaterThanOrEqual(4.5)
  })

  test.each(markPairs)('%s can be seen on %s', (mark, ground) => {
    expect(contrast(colour(mark), colour(ground))).toBeGreaterThanOrEqual(3)
  })

  test.each(tinted)('a tint carries its own %s text with room to spare', (name) => {
    // The palette promises 5.3 to one decimal place.
    expect(contrast(colour(name), colour(`${name}-tint`))).toBeGreaterThanOrEqual(5.25)
  })

  test('contours darken step by step', () => {
    const steps = contours.map((name) => luminance(colour(name)))
    expect(steps).toEqual([...steps].sort((a, b) => b - a))
    expect(new Set(steps).size).toBe(contours.length)
  })

  test('no colour escapes measuring but the hairline, which is ornament', () => {
    const measured = new Set([...textPairs.flat(), ...markPairs.flat(), ...contours, 'hairline'])
    expect(Object.keys(palettes[appearance]).filter((name) => !measured.has(name))).toEqual([])
  })
})

test('night replaces every ground, text and mark of light', () => {
  const same = Object.keys(palettes.light).filter((name) => palettes.light[name] === palettes.night[name])
  expect(same).toEqual(contours)
})
