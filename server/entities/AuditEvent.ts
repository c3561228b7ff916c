import { Column, Entity, ForeignKey, Index, PrimaryColumn } from 'typeorm'
import { Account } from './Account'
import { now } from './columns'
import { Firm } from './Firm'

/** What somebody did, for ever: rows are only ever added, by grants and by triggers. */
@Entity('audit_event')
@Index('audit_event_firm', ['firmId', 'at'])
@Index('audit_event_subject', ['subjectId'])
export class AuditEvent {
  @PrimaryColumn({ type: 'uuid' }) id!: string
  /** Absent for what concerns an account in no firm, as a refused sign-in. */
  @ForeignKey(() => Firm, { name: 'audit_event_firm_fk' })
  @Column({ name: 'firm_id', type: 'uuid', nullable: true })
  firmId!: string | null
  @ForeignKey(() => Account, { name: 'audit_event_account_fk' })
  @Column({ name: 'account_id', type: 'uuid', nullable: true })
  accountId!: string | null
  /** A verb and what it was done to, as `calculation.create`. */
  @Column({ type: 'text' }) action!: string
  @Column({ name: 'subject_id', type: 'uuid', nullable: true }) subjectId!: string | null
  @Column({ type: 'jsonb', default: () => `'{}'` }) details!: Record<string, unknown>
  @Column({ ...now }) at!: Date
}
