/** Column options that many entities share. */
import type { ColumnOptions, ValueTransformer } from 'typeorm'

export const now: ColumnOptions = { type: 'timestamp with time zone', default: () => 'now()' }
export const time: ColumnOptions = { type: 'timestamp with time zone' }

/** PostgreSQL's bigint arrives as text; ours stay far below 2⁵³. Raw queries still see text. */
export const asNumber: ValueTransformer = {
  to: (value: number | null | undefined) => value,
  from: (value: string | null) => (value === null ? null : Number(value)),
}
