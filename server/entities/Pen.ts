import { Column, Entity, ForeignKey, PrimaryColumn } from 'typeorm'
import { Account } from './Account'
import { asNumber, time } from './columns'
import { Document } from './Document'

/** The right to write in one line (or one front text) at this moment. */
@Entity('pen')
@ForeignKey(() => Document, ['firmId', 'documentId'], ['firmId', 'id'], { name: 'pen_document_fk' })
export class Pen {
  @PrimaryColumn({ name: 'document_id', type: 'uuid' }) documentId!: string
  /** The id of a line, or `front:purpose` and the like. */
  @PrimaryColumn({ type: 'text' }) line!: string
  @Column({ name: 'firm_id', type: 'uuid' }) firmId!: string
  @ForeignKey(() => Account, { name: 'pen_holder_fk' })
  @Column({ type: 'uuid' })
  holder!: string
  /** The holder's Yjs client: one person's two tabs are told apart by it. */
  @Column({ name: 'client_id', type: 'bigint', transformer: asNumber }) clientId!: number
  @Column({ ...time }) until!: Date
}
