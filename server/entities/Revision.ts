import { Check, Column, Entity, ForeignKey, PrimaryColumn, Unique } from 'typeorm'
import type { RevisionState } from '@shared/review/states'
import { Account } from './Account'
import { Calculation } from './Calculation'
import { now } from './columns'

/** One pass of a calculation through preparation, checking, approval and issue. */
@Entity('revision')
@Unique('revision_in_firm', ['firmId', 'id'])
@Unique('revision_letter', ['calculationId', 'letter'])
@Check(
  'revision_state',
  `state IN ('preparing', 'checking', 'returned', 'checked', 'issued', 'superseded', 'void')`,
)
@Check('revision_hold', `NOT is_on_hold OR state = 'issued'`)
@ForeignKey(() => Calculation, ['firmId', 'calculationId'], ['firmId', 'id'], {
  name: 'revision_calculation_fk',
})
export class Revision {
  @PrimaryColumn({ type: 'uuid' }) id!: string
  @Column({ name: 'firm_id', type: 'uuid' }) firmId!: string
  @Column({ name: 'calculation_id', type: 'uuid' }) calculationId!: string
  /** A, B, … Z, AA, … */
  @Column({ type: 'text' }) letter!: string
  /** Place in the row of revisions, from 1: letters do not sort past Z. */
  @Column({ type: 'integer' }) ordinal!: number
  @Column({ type: 'text', default: 'preparing' }) state!: RevisionState
  @Column({ name: 'is_on_hold', type: 'boolean', default: false }) isOnHold!: boolean
  /** Why it was begun, and who asked for it. */
  @Column({ type: 'text', default: '' }) reason!: string
  @ForeignKey(() => Account, { name: 'revision_creator_fk' })
  @Column({ name: 'created_by', type: 'uuid' })
  createdBy!: string
  @Column({ name: 'created_at', ...now }) createdAt!: Date
  @Column({ name: 'state_changed_at', ...now }) stateChangedAt!: Date
}
