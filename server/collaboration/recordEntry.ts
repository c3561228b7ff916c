/** One entry of the edit record, before it has a number. */
export interface Entry {
  subject: 'line' | 'block' | 'front'
  subjectId: string
  /** Empty where the line or block as a whole came, went or moved. */
  field: string
  /** JSON text; null where there was nothing. */
  before: string | null
  after: string | null
}

const name = /^[^\p{Cc}]{0,200}$/u

/**
 * Whether its names are such as sheets have. PostgreSQL takes no zero character and no index entry of some
 * thousand: storing would fail, and with it the sheet for everybody who has it open.
 */
export const isStorable = ({ subjectId, field }: Entry): boolean => name.test(subjectId) && name.test(field)
