import { describe, expect, test } from 'vitest'
import { presentSymbol } from '@shared/engine/display'

describe('a symbol', () => {
  test.each([
    ['T', 'T', 'T'],
    ['tau', '\\tau', 'tau'],
    ['tau_max', '\\tau_{\\mathrm{max}}', 'tau max'],
    ['d_o_2', 'd_{\\mathrm{o}{,}\\mathrm{2}}', 'd o 2'],
    ['K_ts_fillet', 'K_{\\mathrm{ts}{,}\\mathrm{fillet}}', 'K ts fillet'],
    ['tau_theta', '\\tau_{\\theta}', 'tau theta'],
    ['T_x', 'T_{x}', 'T x'],
    ["T'", "T'", 'T prime'],
    ["T'_a", "T_{\\mathrm{a}}'", 'T prime a'],
    ["T_a'", "T_{\\mathrm{a}'}", 'T a prime'],
    ['Deltaphi', '\\Delta \\varphi', 'delta phi'],
    ['DeltaT', '\\Delta T', 'delta T'],
    ['Omega', '\\Omega', 'capital omega'],
    ['rpmax', '\\mathrm{rpmax}', 'rpmax'],
    ['S1.tau_max', '\\mathrm{S1}\\mathrm{.}\\tau_{\\mathrm{max}}', 'tau max of S1'],
    ['C.row2.x', 'C\\mathrm{.}\\mathrm{row2}\\mathrm{.}x', 'x of row2 of C'],
  ])('%s', (name, tex, speech) => {
    const drawn = presentSymbol(name)
    expect(drawn.tex).toBe(tex)
    expect(drawn.speech).toBe(speech)
  })

  test('is italic where it is one letter, upright where it is a word', () => {
    expect(presentSymbol('d').print).toEqual({ math: 'letter', text: 'd' })
    expect(presentSymbol('d1').print).toEqual({ math: 'upright', text: 'd1' })
  })

  test('never looks like another one', () => {
    const names = [
      'd_1',
      'd1',
      'd__1',
      'd_1_',
      'd_',
      'd',
      "d'_1",
      "d_1'",
      'd.1',
      'd_1_1',
      'd_11',
      'D_1',
      'delta_1',
    ]
    expect(new Set(names.map((name) => presentSymbol(name).tex)).size).toBe(names.length)
  })
})
