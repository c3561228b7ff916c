import { Column, Entity, ForeignKey, PrimaryColumn } from 'typeorm'
import { now } from './columns'
import { Document } from './Document'

/** All updates of a document up to and with `head`, merged into one. */
@Entity('document_state')
@ForeignKey(() => Document, ['firmId', 'documentId'], ['firmId', 'id'], { name: 'document_state_fk' })
export class DocumentState {
  @PrimaryColumn({ name: 'document_id', type: 'uuid' }) documentId!: string
  @Column({ name: 'firm_id', type: 'uuid' }) firmId!: string
  @Column({ type: 'integer' }) head!: number
  @Column({ type: 'bytea' }) bytes!: Buffer
  @Column({ name: 'compacted_at', ...now }) compactedAt!: Date
}
