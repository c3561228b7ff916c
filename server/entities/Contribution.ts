import { Check, Column, Entity, ForeignKey, Index, PrimaryColumn } from 'typeorm'
import { Account } from './Account'
import { now } from './columns'
import { Document } from './Document'

/**
 * The edit record: who changed which field of which line or block, from what to what. Independence and
 * the history of a line come from it, so it is written in the transaction that stores the update.
 */
@Entity('contribution')
@Index('contribution_subject', ['documentId', 'subjectId'])
@Index('contribution_account', ['firmId', 'accountId'])
@Check('contribution_subject_kind', `subject IN ('line', 'block', 'front')`)
@ForeignKey(() => Document, ['firmId', 'documentId'], ['firmId', 'id'], { name: 'contribution_document_fk' })
export class Contribution {
  @PrimaryColumn({ name: 'document_id', type: 'uuid' }) documentId!: string
  @PrimaryColumn({ type: 'integer' }) head!: number
  /** Place among the entries of one update, from 0. */
  @PrimaryColumn({ type: 'integer' }) position!: number
  @Column({ name: 'firm_id', type: 'uuid' }) firmId!: string
  /** Absent where the server itself wrote, which counts as nobody's authorship. */
  @ForeignKey(() => Account, { name: 'contribution_account_fk' })
  @Column({ name: 'account_id', type: 'uuid', nullable: true })
  accountId!: string | null
  @Column({ type: 'text' }) subject!: 'line' | 'block' | 'front'
  /** The id of the line or heading, or the name of the front text. */
  @Column({ name: 'subject_id', type: 'text' }) subjectId!: string
  /** Path of the field; empty where the line or block as a whole came, went or moved. */
  @Column({ type: 'text', default: '' }) field!: string
  /** JSON text, not jsonb, which would rewrite numbers; absent where there was nothing. */
  @Column({ type: 'text', nullable: true }) before!: string | null
  @Column({ type: 'text', nullable: true }) after!: string | null
  @Column({ ...now }) at!: Date
}
