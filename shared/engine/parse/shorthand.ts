/** The compact form of one line, as typed in a paragraph or in a block of the text form. */

export interface CompactTail {
  /** After ` -- `; the title of a criterion. */
  note?: string
  /** In `[…]`. */
  source?: string
  /** `#id` in `{…}`. */
  id?: string
  /** `key=value` in `{…}`, by key. */
  fields: Record<string, string>
}

export type CompactFields =
  | (CompactTail & {
      kind: 'given'
      symbol: string
      value: string
      unit: string
      tolerance?: { plus: string; minus: string } | { fit: string }
    })
  | (CompactTail & { kind: 'formula'; symbol: string; expression: string; unit: string })
  | (CompactTail & {
      kind: 'criterion'
      /** Empty where the author gave none. */
      symbol: string
      demand: string
      relation: '<=' | '<' | '>=' | '>' | 'within'
      limit: string
      upper?: string
    })

export type CompactReading =
  | { reading: 'line'; line: CompactFields }
  /** `b = 10 m` beside a symbol `m`: the author is asked. */
  | { reading: 'ambiguous'; given: CompactFields; formula: CompactFields }
  /** Ordinary text, or not readable where a line must stand: `message` says why. */
  | { reading: 'none'; message: string }

export interface CompactContext {
  isDefined(name: string): boolean
  /** The info word of the block it stands in; absent in a paragraph. */
  block?: 'given' | 'formula' | 'criterion'
}

export declare const readCompact: (text: string, context: CompactContext) => CompactReading
/** The one-line form that `readCompact` reads as the same fields; undefined where only YAML can hold them. */
export declare const writeCompact: (line: CompactFields) => string | undefined
