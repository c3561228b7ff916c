import { Check, Column, Entity, ForeignKey, Index, PrimaryColumn, Unique } from 'typeorm'
import type { FirmRole } from '@shared/review/permissions'
import { Account } from './Account'
import { now } from './columns'
import { Firm } from './Firm'

/** A person's place and role in one firm. */
@Entity('membership')
@Unique('membership_once', ['firmId', 'accountId'])
@Index('membership_account', ['accountId'])
@Check('membership_role', `role IN ('administrator', 'steward', 'engineer', 'observer')`)
export class Membership {
  @PrimaryColumn({ type: 'uuid' }) id!: string
  @ForeignKey(() => Firm, { name: 'membership_firm_fk' })
  @Column({ name: 'firm_id', type: 'uuid' })
  firmId!: string
  @ForeignKey(() => Account, { name: 'membership_account_fk' })
  @Column({ name: 'account_id', type: 'uuid' })
  accountId!: string
  @Column({ type: 'text' }) role!: FirmRole
  /** A leaver's membership stays, so that their name stands where they worked. */
  @Column({ name: 'is_active', type: 'boolean', default: true }) isActive!: boolean
  @Column({ name: 'created_at', ...now }) createdAt!: Date
}
