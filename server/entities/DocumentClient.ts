import { Column, Entity, ForeignKey, PrimaryColumn } from 'typeorm'
import { Account } from './Account'
import { asNumber, now } from './columns'
import { Document } from './Document'

/** Whose a Yjs client id is in one document: the first account that sent it, for ever. */
@Entity('document_client')
@ForeignKey(() => Document, ['firmId', 'documentId'], ['firmId', 'id'], { name: 'document_client_fk' })
export class DocumentClient {
  @PrimaryColumn({ name: 'document_id', type: 'uuid' }) documentId!: string
  @PrimaryColumn({ name: 'client_id', type: 'bigint', transformer: asNumber }) clientId!: number
  @Column({ name: 'firm_id', type: 'uuid' }) firmId!: string
  @ForeignKey(() => Account, { name: 'document_client_account_fk' })
  @Column({ name: 'account_id', type: 'uuid' })
  accountId!: string
  @Column({ name: 'bound_at', ...now }) boundAt!: Date
}
