import { Column, Entity, Index, PrimaryColumn } from 'typeorm'
import { time } from './columns'

/** How often something was tried in a span of time, counted for all processes together. */
@Entity('rate_window')
@Index('rate_window_resets_at', ['resetsAt'])
export class RateWindow {
  /** What is counted, as `sign-in:address:…`; never a secret. */
  @PrimaryColumn({ type: 'text' }) key!: string
  @Column({ type: 'integer' }) hits!: number
  @Column({ name: 'resets_at', ...time }) resetsAt!: Date
}
