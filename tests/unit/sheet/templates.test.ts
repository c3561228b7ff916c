import { readFileSync, readdirSync } from 'node:fs'
import { describe, expect, test } from 'vitest'
import { canonicalText } from '@shared/sheet/canonical'
import { linesOf } from '@shared/sheet/lines'
import { exportText, importText } from '@shared/sheet/text'

const folder = new URL('../../../templates/', import.meta.url)
const files = readdirSync(folder).filter((name) => name.endsWith('.md'))

test('there are templates for the six commonest calculations', () => {
  expect(files).toEqual(
    expect.arrayContaining([
      'solid-shaft.md',
      'hollow-against-solid.md',
      'power-and-speed-rating.md',
      'stepped-shaft-line.md',
      'shaft-fixed-at-both-ends.md',
      'closed-box-section.md',
    ]),
  )
})

describe.each(files)('the template %s', (name) => {
  const text = readFileSync(new URL(name, folder), 'utf8')
  const { sheet, heading, problems } = importText(text)
  const lines = sheet ? linesOf(sheet) : []

  test('is read without a problem', () => {
    expect(problems).toEqual([])
    expect(heading.title).not.toBe('')
    expect(heading.template?.edition).toMatch(/^\d+$/)
  })

  test('opens with purpose, method, sources with editions, and cautions', () => {
    expect(sheet?.front.purpose.length).toBeGreaterThan(80)
    expect(sheet?.front.method.length).toBeGreaterThan(80)
    expect(Object.values(sheet?.front.sources ?? {}).every((source) => source.edition)).toBe(true)
    expect(text).toContain('**Cautions.**')
    expect(text).toContain('# Scope and limits')
  })

  test('has a source or a basis for every given, and a range or the word constant', () => {
    const givens = lines.filter((line) => line.kind === 'given')
    expect(givens.length).toBeGreaterThan(4)
    for (const given of givens) {
      expect([given.symbol, given.source !== '' || (given.basis ?? '') !== '']).toEqual([given.symbol, true])
      expect([given.symbol, given.nature === 'constant' || given.range !== undefined]).toEqual([
        given.symbol,
        true,
      ])
    }
  })

  test('names in its lines only sources that it lists, or documents of the job', () => {
    const listed = Object.keys(sheet?.front.sources ?? {})
    const documents = [
      'load specification',
      'drawing',
      'design brief',
      'motor data sheet',
      'coupling catalogue',
      'gear and coupling catalogue',
    ]
    for (const line of lines) {
      if (!('source' in line) || line.source === '') continue
      const key = [...listed, ...documents].find(
        (known) => line.source === known || line.source.startsWith(`${known}, `),
      )
      expect([line.symbol, line.source, key]).not.toContain(undefined)
    }
  })

  test('says what it reports and what it demands', () => {
    expect(lines.filter((line) => line.kind === 'criterion').length).toBeGreaterThanOrEqual(2)
    expect(lines.filter((line) => line.kind === 'formula' && line.reported).length).toBeGreaterThanOrEqual(2)
  })

  test('is the same after it was written and read again', () => {
    const again = sheet && importText(exportText(sheet, heading))
    expect(again?.problems).toEqual([])
    expect(canonicalText(again?.sheet)).toBe(canonicalText(sheet))
  })
})
