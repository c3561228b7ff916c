import { Check, Column, Entity, ForeignKey, Index, PrimaryColumn } from 'typeorm'
import type { Part } from '@shared/review/permissions'
import { Account } from './Account'
import { Calculation } from './Calculation'
import { now, time } from './columns'

/** The part of a person on a calculation. Never deleted: a part given up keeps its dates. */
@Entity('participation')
@Index('participation_once', ['calculationId', 'accountId', 'part'], {
  unique: true,
  where: 'ended_at IS NULL',
})
@Index('participation_account', ['firmId', 'accountId'])
@Check('participation_part', `part IN ('preparer', 'checker', 'approver', 'observer')`)
@ForeignKey(() => Calculation, ['firmId', 'calculationId'], ['firmId', 'id'], {
  name: 'participation_calculation_fk',
})
export class Participation {
  @PrimaryColumn({ type: 'uuid' }) id!: string
  @Column({ name: 'firm_id', type: 'uuid' }) firmId!: string
  @Column({ name: 'calculation_id', type: 'uuid' }) calculationId!: string
  @ForeignKey(() => Account, { name: 'participation_account_fk' })
  @Column({ name: 'account_id', type: 'uuid' })
  accountId!: string
  @Column({ type: 'text' }) part!: Part
  @ForeignKey(() => Account, { name: 'participation_appointer_fk' })
  @Column({ name: 'appointed_by', type: 'uuid' })
  appointedBy!: string
  @Column({ name: 'appointed_at', ...now }) appointedAt!: Date
  /** What is asked of the person, in the words of who appointed them. */
  @Column({ type: 'text', default: '' }) note!: string
  @Column({ name: 'ended_at', ...time, nullable: true }) endedAt!: Date | null
}
