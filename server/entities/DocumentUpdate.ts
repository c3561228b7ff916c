import { Column, Entity, ForeignKey, PrimaryColumn } from 'typeorm'
import { Account } from './Account'
import { asNumber, now } from './columns'
import { Document } from './Document'

/** One accepted update of a document, by number. */
@Entity('document_update')
@ForeignKey(() => Document, ['firmId', 'documentId'], ['firmId', 'id'], { name: 'document_update_fk' })
export class DocumentUpdate {
  @PrimaryColumn({ name: 'document_id', type: 'uuid' }) documentId!: string
  @PrimaryColumn({ type: 'integer' }) head!: number
  @Column({ name: 'firm_id', type: 'uuid' }) firmId!: string
  /** Absent where the server itself wrote: the first content, a repair. */
  @ForeignKey(() => Account, { name: 'document_update_account_fk' })
  @Column({ name: 'account_id', type: 'uuid', nullable: true })
  accountId!: string | null
  /** The Yjs client that sent it. */
  @Column({ name: 'client_id', type: 'bigint', nullable: true, transformer: asNumber }) clientId!:
    number | null
  @Column({ type: 'bytea' }) bytes!: Buffer
  @Column({ name: 'stored_at', ...now }) storedAt!: Date
}
