import { Check, Column, Entity, PrimaryColumn, Unique } from 'typeorm'
import { now, time } from './columns'

/** A person who can sign in. Belongs to no firm: memberships do. */
@Entity('account')
@Unique('account_email', ['email'])
@Check('account_email_lower', 'email = lower(email)')
export class Account {
  @PrimaryColumn({ type: 'uuid' }) id!: string
  /** Always in lower case. */
  @Column({ type: 'text' }) email!: string
  @Column({ type: 'text' }) name!: string
  /** argon2id; absent until the person has used the one-time link. */
  @Column({ name: 'password_hash', type: 'text', nullable: true, select: false }) passwordHash!: string | null
  @Column({ name: 'is_active', type: 'boolean', default: true }) isActive!: boolean
  /** One of the people of the demo, whom *Continue as…* offers. */
  @Column({ name: 'is_demo', type: 'boolean', default: false }) isDemo!: boolean
  @Column({ name: 'password_changed_at', ...time, nullable: true }) passwordChangedAt!: Date | null
  @Column({ name: 'created_at', ...now }) createdAt!: Date
}
