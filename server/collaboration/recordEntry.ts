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
