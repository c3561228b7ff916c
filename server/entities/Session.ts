import { Column, Entity, Index, PrimaryColumn } from 'typeorm'

/** Kept by connect-pg-simple, which fixes the names of the columns; we only revoke by account. */
@Entity('session')
@Index('session_expire', ['expire'])
@Index('session_account', { synchronize: false })
export class Session {
  @PrimaryColumn({ type: 'character varying', primaryKeyConstraintName: 'session_pkey' }) sid!: string
  @Column({ type: 'json' }) sess!: unknown
  @Column({ type: 'timestamp without time zone', precision: 6 }) expire!: Date
}
