/** Arbitrary sheets for property tests, with the texts that break text formats. */
import fc from 'fast-check'
import type { Block, Inline, Mark, Prose, Sheet } from '@shared/sheet/sheet'
import { frontSchema } from '@shared/sheet/sheet'
import { lineSchema } from '@shared/sheet/kinds'
import type { Line } from '@shared/sheet/kinds'

const nasty = fc.constantFrom(
  'a | b',
  '\\',
  '\\|',
  '\\\\',
  'shaft -- seat',
  '[EN 1993-1-1, 6.2.7]',
  '[',
  ']',
  '{#id}',
  '{a=b}',
  '🔩⚙️',
  'é',
  'τ_max',
  '`',
  '``',
  '```',
  '~~~',
  '#',
  '# a',
  '- a',
  '1. a',
  '1) b',
  '> q',
  '---',
  '===',
  '***',
  '_a_',
  '__',
  '**',
  '*',
  '&amp;',
  '&',
  '&#32;',
  '<br>',
  '<b>',
  '<https://a.b>',
  '!',
  '![a](b)',
  '[T](value:)',
  '[C1](line:)',
  '[x]: y',
  '|',
  '| --- |',
  ' ',
  '  ',
  '\t',
  '\n',
  '\r\n',
  '\u00a0',
  '\u2028',
  '\u0000',
  '\u0007',
  '\u0085',
  '\ud800',
  '\ufeff',
  ': x',
  '"',
  "'",
  'null',
  'true',
  '1e5',
  '60.0',
  '~',
  '@x',
  '%',
  '%3B',
  ';digits=3',
  '$x$',
  '__proto__',
  'constructor',
  '+',
  '=',
  'to MPa',
  'pi*d^3/16',
  'T_2',
)
const text = fc.oneof(
  {
    weight: 4,
    arbitrary: fc
      .array(fc.oneof(nasty, fc.string({ maxLength: 6 }), fc.string({ unit: 'binary', maxLength: 4 })), {
        maxLength: 4,
      })
      .map((parts) => parts.join('')),
  },
  {
    weight: 3,
    arbitrary: fc.constantFrom(
      '60',
      '210e3',
      'mm',
      'N m',
      'd_o',
      'outside diameter',
      'drawing 7-114',
      'T/W_t',
      '16*T/(pi*d_o^3)',
      'C1',
      'tau',
    ),
  },
  { weight: 1, arbitrary: fc.string({ unit: 'grapheme', maxLength: 40 }) },
)
const short = text.map((value) => value.slice(0, 400))
const id = fc.oneof(
  fc.stringMatching(/^[A-Za-z0-9_-]{1,8}$/),
  fc.constantFrom('h1', 'h2', 'd_o', 'line', 'x-2'),
)
const rowName = fc.stringMatching(/^[A-Za-z0-9]{1,4}$/)
const column = fc.constantFrom('length', 'd', 'name', 'title', 'cells', 'G', 'd_o', 'a b', 'x:y', '')

const mark: fc.Arbitrary<Mark> = fc.oneof(
  fc.constantFrom<Mark>({ type: 'bold' }, { type: 'italic' }, { type: 'code' }),
  fc
    .constantFrom(
      'https://example.org/a?b=c&d=e',
      'mailto:a@example.org',
      'javascript:alert(1)',
      'https://example.org/(x)|<y>\\z',
      'http://é.example/%20',
      'https://example.org/a b',
    )
    .map((href): Mark => ({ type: 'link', href })),
)

const inline: fc.Arbitrary<Inline> = fc.oneof(
  {
    weight: 6,
    arbitrary: fc.record({
      type: fc.constant('text' as const),
      text,
      marks: fc.array(mark, { maxLength: 3 }),
    }),
  },
  { weight: 1, arbitrary: fc.constant<Inline>({ type: 'break' }) },
  {
    weight: 1,
    arbitrary: fc.record(
      {
        type: fc.constant('quote' as const),
        symbol: short.map((symbol) => symbol.slice(0, 200)),
        unit: short.map((unit) => unit.slice(0, 100)),
        digits: fc.integer({ min: 1, max: 15 }),
      },
      { requiredKeys: ['type', 'symbol'] },
    ),
  },
  {
    weight: 1,
    arbitrary: fc.record({
      type: fc.constant('reference' as const),
      line: fc.oneof(
        id,
        short.map((line) => line.slice(0, 64)),
      ),
    }),
  },
)
const content = fc.array(inline, { maxLength: 6 })

const { prose } = fc.letrec<{ prose: Prose }>((tie) => ({
  prose: fc.oneof(
    { depthSize: 'small', maxDepth: 4 },
    fc.record({ type: fc.constant('paragraph' as const), content }),
    fc.record({
      type: fc.constant('heading' as const),
      id: fc.oneof(id, fc.constant('')),
      level: fc.constantFrom(1 as const, 2 as const, 3 as const),
      content,
    }),
    fc.record({
      type: fc.constant('grid' as const),
      rows: fc.array(fc.array(fc.record({ head: fc.boolean(), content }), { maxLength: 3 }), {
        maxLength: 3,
      }),
    }),
    fc.record({
      type: fc.constant('bullets' as const),
      items: fc.array(fc.array(tie('prose'), { maxLength: 3 }), { maxLength: 3 }),
    }),
    fc.record({
      type: fc.constant('numbers' as const),
      start: fc.oneof(fc.constant(1), fc.integer({ min: 0, max: 999_999_999 })),
      items: fc.array(fc.array(tie('prose'), { maxLength: 3 }), { maxLength: 3 }),
    }),
  ),
}))

const cells = fc.dictionary(column, short, { maxKeys: 4 })
const rows = (withTitle: boolean) =>
  fc.uniqueArray(
    fc.record(
      { name: rowName, cells, ...(withTitle ? { title: short } : {}) },
      { requiredKeys: ['name', 'cells'] },
    ),
    { maxLength: 4, selector: ({ name }) => name },
  )
const common = {
  id,
  symbol: short.map((symbol) => symbol.slice(0, 200)),
  note: text,
  origin: fc.record({ template: short, edition: short, line: short }),
  contested: fc.record({
    // Yjs leaves out a key that would set an object's prototype, as it should.
    fields: fc
      .dictionary(fc.string(), fc.jsonValue())
      .filter((fields) => !JSON.stringify(fields).includes('__proto__')),
    by: short,
    at: short,
  }),
}
const texts = fc.array(short, { maxLength: 3 })
const kinds: Record<Line['kind'], Record<string, fc.Arbitrary<unknown>>> = {
  given: {
    value: short,
    unit: short,
    tolerance: fc.oneof(fc.record({ plus: short, minus: short }), fc.record({ fit: short })),
    spread: fc.constantFrom('normal', 'uniform'),
    nature: fc.constantFrom('input', 'assumption', 'constant'),
    basis: text,
    toConfirm: fc.record({ owner: short, due: short }),
    range: fc.record({ from: short, to: short }, { requiredKeys: [] }),
    choices: texts,
    plainRate: fc.boolean(),
    source: short,
    register: fc.record({ material: short, property: short, version: short }),
  },
  formula: {
    expression: text,
    unit: short,
    digits: fc.integer({ min: 1, max: 15 }),
    reported: fc.boolean(),
    source: short,
  },
  criterion: {
    title: short,
    demand: text,
    relation: fc.constantFrom('<=', '<', '>=', '>', 'within'),
    limit: text,
    upper: text,
    signed: fc.boolean(),
    source: short,
  },
  analysis: {
    analysis: short,
    inputs: fc.dictionary(
      fc.constantFrom('outer', 'segments', 'torques', '__proto__', 'a.b'),
      fc.oneof(text, rows(false)),
      { maxKeys: 3 },
    ),
  },
  cases: { rows: rows(true), outputs: texts, criteria: texts },
  sizing: {
    vary: short,
    criterion: short,
    between: fc.tuple(text, text),
    series: fc.constantFrom('exact', 'R20', 'list'),
    list: texts,
  },
  parametric: {
    vary: short,
    from: text,
    to: text,
    points: fc.integer({ min: 2, max: 10_000 }),
    vary2: short,
    points2: fc.integer({ min: 2, max: 99 }),
    outputs: texts,
  },
  tolerance: {
    outputs: texts,
    criteria: texts,
    method: fc.constantFrom('worst-case', 'monte-carlo'),
    samples: fc.integer({ min: 100, max: 10_000_000 }),
    seed: fc.integer({ min: 0, max: 4_294_967_295 }),
  },
  table: {
    columns: fc.array(fc.record({ name: rowName, unit: short }), { maxLength: 3 }),
    rows: rows(false),
    source: short,
  },
  figure: { attachment: short, caption: text, source: short },
}

export const arbitraryLine: fc.Arbitrary<Line> = fc
  .constantFrom(...(Object.keys(kinds) as Line['kind'][]))
  .chain((kind) =>
    fc.record({ ...common, ...kinds[kind] }, { requiredKeys: ['id'] }).map((fields) => ({ ...fields, kind })),
  )
  .map((fields) => lineSchema.parse(fields))

const block: fc.Arbitrary<Block> = fc.oneof(
  { weight: 3, arbitrary: prose },
  { weight: 2, arbitrary: arbitraryLine.map((line): Block => ({ type: 'line', line })) },
)

export const arbitrarySheet: fc.Arbitrary<Sheet> = fc.record({
  front: fc
    .record(
      {
        purpose: text,
        method: text,
        conclusion: text,
        unitSystem: fc.constantFrom('SI', 'US'),
        language: fc.constantFrom('en', 'de-CH'),
        sources: fc.dictionary(
          fc.stringMatching(/^[A-Za-z0-9][A-Za-z0-9 ._-]{0,8}$/),
          fc.record(
            { title: short, edition: short.map((e) => e.slice(0, 200)), filed: short },
            { requiredKeys: ['title'] },
          ),
          { maxKeys: 3 },
        ),
      },
      { requiredKeys: [] },
    )
    .map((front) => frontSchema.parse(front)),
  blocks: fc.array(block, { maxLength: 8 }),
})
