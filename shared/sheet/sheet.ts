/**
 * A sheet as plain JSON: what `readSheet` makes of the live document, what the text form reads and
 * writes, and what engine, print, snapshot and comparison read. It holds only what people wrote.
 */
import { z } from 'zod'
import { lineSchema } from './kinds'

/** Raised when a document written now could not be read by an older program. */
export const FORMAT_VERSION = 1

const text = (most: number) => z.string().max(most)

export const sourceSchema = z.object({
  title: text(400),
  edition: text(200).optional(),
  clause: text(200).optional(),
  /** Where it is filed. */
  filed: text(400).optional(),
})
export type Source = z.infer<typeof sourceSchema>

export const frontSchema = z.object({
  purpose: text(20_000).default(''),
  method: text(20_000).default(''),
  conclusion: text(20_000).default(''),
  unitSystem: z.enum(['SI', 'US']).default('SI'),
  /** Language of the document, BCP 47. */
  language: text(35).default('en'),
  sources: z.record(z.string().regex(/^[A-Za-z0-9][A-Za-z0-9 ._-]{0,79}$/), sourceSchema).default({}),
})
export type Front = z.infer<typeof frontSchema>

/** Marks of a run of text, in this order. */
export const markSchema = z.union([
  z.object({ type: z.enum(['bold', 'italic', 'code']) }),
  z.object({ type: z.literal('link'), href: text(2000) }),
])
export type Mark = z.infer<typeof markSchema>

export const inlineSchema = z.union([
  z.object({ type: z.literal('text'), text: z.string(), marks: z.array(markSchema).optional() }),
  z.object({ type: z.literal('break') }),
  /** A quoted value: live, in running text. */
  z.object({
    type: z.literal('quote'),
    symbol: text(200),
    unit: text(100).optional(),
    digits: z.number().int().min(1).max(15).optional(),
  }),
  /** A reference to a line, by id; shown as its number. */
  z.object({ type: z.literal('reference'), line: text(64) }),
])
export type Inline = z.infer<typeof inlineSchema>

export type Prose =
  | { type: 'paragraph'; content: Inline[] }
  | { type: 'heading'; id: string; level: 1 | 2 | 3; content: Inline[] }
  | { type: 'bullets'; items: Prose[][] }
  | { type: 'numbers'; start: number; items: Prose[][] }
  | { type: 'grid'; rows: { head: boolean; content: Inline[] }[][] }

export const proseSchema: z.ZodType<Prose> = z.lazy(() =>
  z.union([
    z.object({ type: z.literal('paragraph'), content: z.array(inlineSchema) }),
    z.object({
      type: z.literal('heading'),
      id: text(64),
      level: z.union([z.literal(1), z.literal(2), z.literal(3)]),
      content: z.array(inlineSchema),
    }),
    z.object({ type: z.literal('bullets'), items: z.array(z.array(proseSchema)) }),
    z.object({
      type: z.literal('numbers'),
      start: z.number().int().min(0).max(999_999_999),
      items: z.array(z.array(proseSchema)),
    }),
    z.object({
      type: z.literal('grid'),
      rows: z.array(z.array(z.object({ head: z.boolean(), content: z.array(inlineSchema) }))),
    }),
  ]),
)

export const blockSchema = z.union([proseSchema, z.object({ type: z.literal('line'), line: lineSchema })])
export type Block = z.infer<typeof blockSchema>

export const sheetSchema = z.object({ front: frontSchema, blocks: z.array(blockSchema) })
export type Sheet = z.infer<typeof sheetSchema>
