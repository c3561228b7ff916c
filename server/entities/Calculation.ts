import { Column, Entity, ForeignKey, Index, PrimaryColumn, Unique } from 'typeorm'
import { Account } from './Account'
import { now } from './columns'
import { Project } from './Project'

/** One numbered document, living through revisions A, B, C… */
@Entity('calculation')
@Unique('calculation_in_firm', ['firmId', 'id'])
@Unique('calculation_number', ['firmId', 'number'])
@Index('calculation_project', ['firmId', 'projectId'])
@ForeignKey(() => Project, ['firmId', 'projectId'], ['firmId', 'id'], { name: 'calculation_project_fk' })
export class Calculation {
  @PrimaryColumn({ type: 'uuid' }) id!: string
  @Column({ name: 'firm_id', type: 'uuid' }) firmId!: string
  @Column({ name: 'project_id', type: 'uuid' }) projectId!: string
  @Column({ type: 'text' }) number!: string
  @Column({ type: 'text' }) title!: string
  /** The day it is wanted, without a time. */
  @Column({ name: 'due_on', type: 'date', nullable: true }) dueOn!: string | null
  @ForeignKey(() => Account, { name: 'calculation_creator_fk' })
  @Column({ name: 'created_by', type: 'uuid' })
  createdBy!: string
  @Column({ name: 'created_at', ...now }) createdAt!: Date
}
