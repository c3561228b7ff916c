import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { canonicalText } from '@shared/sheet/canonical'
import { normalise } from '@shared/sheet/normalise'
import { exportText, importText } from '@shared/sheet/text'
import { frontSchema } from '@shared/sheet/sheet'
import type { Inline } from '@shared/sheet/sheet'
import { arbitrarySheet } from '../support/arbitrarySheet'

const heading = {
  title: 'Drive shaft: “60 mm” -- a | b',
  number: 'TF-0042',
  template: { name: 'Solid shaft', edition: '3' },
}

describe('a sheet written as text and read again', () => {
  test('is the same sheet, whatever people wrote in it', () => {
    fc.assert(
      fc.property(arbitrarySheet, (sheet) => {
        const normal = normalise(sheet)
        const text = exportText(sheet, heading)
        const read = importText(text)
        expect(read.problems).toEqual([])
        expect(read.heading).toEqual(heading)
        expect(canonicalText(read.sheet)).toBe(canonicalText(normal))
      }),
      { numRuns: Number(process.env.PROPERTY_RUNS ?? 500) },
    )
  })

  test('is in normal form, and the normal form of that is itself', () => {
    fc.assert(
      fc.property(arbitrarySheet, (sheet) => {
        const normal = normalise(sheet)
        expect(canonicalText(normalise(normal))).toBe(canonicalText(normal))
      }),
      { numRuns: 150 },
    )
  })

  test('keeps a pasted novel, letter by letter', () => {
    const words = Array.from({ length: 40_000 }, (_, index) =>
      index % 7 === 0 ? 'so-called *shaft*' : `w${index}_x`,
    ).join(' ')
    const content: Inline[] = [{ type: 'text', text: words }]
    const read = importText(
      exportText(
        {
          front: frontSchema.parse({ purpose: words.slice(0, 20_000) }),
          blocks: [{ type: 'paragraph', content }],
        },
        { title: '' },
      ),
    )
    expect(read.problems).toEqual([])
    expect(read.sheet?.blocks).toEqual([{ type: 'paragraph', content }])
  })
})

describe('any text at all', () => {
  test('is read without an exception, and what was read can be written again', () => {
    const fragments = fc.constantFrom(
      '---\n',
      'torfolio: 1\n',
      'title: [\n',
      '```given\n',
      '```given yaml\n',
      '```\n',
      '- symbol: d\n',
      '  value: &a 1\n',
      '| a | b |\n| --- | --- |\n| 1 | 2 | 3 |\n',
      '# ',
      '> ',
      '- ',
      '\t',
      '![x](y)',
      '<br>',
      '[T](value:;digits=99)',
      '[C](line:)',
      '`',
      '**',
      '*a* ',
      'd = 60 mm -- x [y] {z=1}\n',
      '***\n',
      '&#0;',
      '[a]: http://b\n',
      '{#x}\n',
    )
    fc.assert(
      fc.property(fc.array(fc.oneof(fragments, fc.string({ maxLength: 12 })), { maxLength: 14 }), (parts) => {
        const read = importText(parts.join(''))
        expect(read.sheet).toBeDefined()
        if (!read.sheet) return
        const again = importText(exportText(read.sheet, read.heading))
        expect(again.problems).toEqual([])
        expect(canonicalText(again.sheet)).toBe(canonicalText(normalise(read.sheet)))
      }),
      { numRuns: 400 },
    )
  })
})
