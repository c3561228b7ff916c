import { Check, Column, Entity, ForeignKey, PrimaryColumn, Unique } from 'typeorm'
import type { SupervisionLevel } from '@shared/review/permissions'
import { now } from './columns'
import { Firm } from './Firm'

/** A job of the firm; holds calculations. */
@Entity('project')
@Unique('project_in_firm', ['firmId', 'id'])
@Unique('project_number', ['firmId', 'number'])
@Check('project_supervision', `supervision IN ('DSL1', 'DSL2', 'DSL3')`)
export class Project {
  @PrimaryColumn({ type: 'uuid' }) id!: string
  @ForeignKey(() => Firm, { name: 'project_firm_fk' })
  @Column({ name: 'firm_id', type: 'uuid' })
  firmId!: string
  @Column({ type: 'text' }) number!: string
  @Column({ type: 'text' }) name!: string
  @Column({ type: 'text', default: '' }) client!: string
  /** Whose law governs: a stamp needs a credential of this place. */
  @Column({ type: 'text', default: '' }) jurisdiction!: string
  @Column({ type: 'text', array: true, default: () => `'{}'` }) disciplines!: string[]
  @Column({ type: 'text', default: 'DSL2' }) supervision!: SupervisionLevel
  @Column({ name: 'created_at', ...now }) createdAt!: Date
}
