import { Check, Column, Entity, ForeignKey, Index, PrimaryColumn, Unique } from 'typeorm'
import { Account } from './Account'
import { now, time } from './columns'
import { Firm } from './Firm'

/** A one-time link: only the SHA-256 of what the link carries is kept. */
@Entity('token')
@Unique('token_hash', ['hash'])
@Index('token_account', ['accountId'])
@Check('token_purpose', `purpose IN ('password')`)
export class Token {
  @PrimaryColumn({ type: 'uuid' }) id!: string
  @Column({ type: 'bytea' }) hash!: Buffer
  @Column({ type: 'text' }) purpose!: 'password'
  @ForeignKey(() => Account, { name: 'token_account_fk', onDelete: 'CASCADE' })
  @Column({ name: 'account_id', type: 'uuid' })
  accountId!: string
  /** The firm whose administrator asked for it. */
  @ForeignKey(() => Firm, { name: 'token_firm_fk', onDelete: 'CASCADE' })
  @Column({ name: 'firm_id', type: 'uuid', nullable: true })
  firmId!: string | null
  @Column({ name: 'expires_at', ...time }) expiresAt!: Date
  @Column({ name: 'used_at', ...time, nullable: true }) usedAt!: Date | null
  @Column({ name: 'created_at', ...now }) createdAt!: Date
}
