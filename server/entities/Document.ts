import { Check, Column, Entity, ForeignKey, PrimaryColumn, Unique } from 'typeorm'
import { asNumber, now } from './columns'
import { Revision } from './Revision'

/**
 * The live document of one revision in work. Its row orders everything: an append raises `head` where
 * `epoch` fits and `writable` holds; closing it to edits locks the same row.
 */
@Entity('document')
@Unique('document_in_firm', ['firmId', 'id'])
@Unique('document_revision', ['revisionId'])
@Check('document_head', 'head >= 0 AND epoch >= 1')
@ForeignKey(() => Revision, ['firmId', 'revisionId'], ['firmId', 'id'], { name: 'document_revision_fk' })
export class Document {
  @PrimaryColumn({ type: 'uuid' }) id!: string
  @Column({ name: 'firm_id', type: 'uuid' }) firmId!: string
  /** Absent for the draft of a template. */
  @Column({ name: 'revision_id', type: 'uuid', nullable: true }) revisionId!: string | null
  /** The number of the last update stored. */
  @Column({ type: 'integer', default: 0 }) head!: number
  @Column({ type: 'integer', default: 1 }) epoch!: number
  @Column({ type: 'boolean', default: true }) writable!: boolean
  /** The format version (`FORMAT_VERSION`) that its content needs. */
  @Column({ type: 'integer' }) format!: number
  /** Bytes of all its updates together, held against the quota of a document. */
  @Column({ name: 'stored_bytes', type: 'bigint', default: 0, transformer: asNumber }) storedBytes!: number
  @Column({ name: 'created_at', ...now }) createdAt!: Date
  @Column({ name: 'changed_at', ...now }) changedAt!: Date
}
