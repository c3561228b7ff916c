import { Column, Entity, PrimaryColumn } from 'typeorm'
import { now } from './columns'

/** The organisation that owns everything below it. */
@Entity('firm')
export class Firm {
  @PrimaryColumn({ type: 'uuid' }) id!: string
  @Column({ type: 'text' }) name!: string
  /** IANA name; times are kept in UTC and shown in this zone. */
  @Column({ name: 'time_zone', type: 'text', default: 'UTC' }) timeZone!: string
  /** Stands before the number of a calculation: `TF` in TF-0042. */
  @Column({ name: 'number_prefix', type: 'text', default: 'TF' }) numberPrefix!: string
  /** Counted up on the locked row in the transaction that makes a calculation, so that no number is left out. */
  @Column({ name: 'last_number', type: 'integer', default: 0 }) lastNumber!: number
  @Column({ name: 'created_at', ...now }) createdAt!: Date
}
