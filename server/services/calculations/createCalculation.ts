import { randomUUID } from 'node:crypto'
import type { Beginning, NewCalculation } from '@shared/api/calculations'
import { FORMAT_VERSION } from '@shared/sheet/sheet'
import type { Sheet } from '@shared/sheet/sheet'
import { encodeSheet } from '@shared/sheet/document'
import { insertCalculation } from '@server/repositories/calculations'
import { insertContributions } from '@server/repositories/contributions'
import type { ContributionRow } from '@server/repositories/contributions'
import { insertDocument } from '@server/repositories/documents'
import { insertUpdates, raiseHead } from '@server/repositories/documentUpdates'
import { recordEvent } from '@server/repositories/auditEvents'
import { takeNumber } from '@server/repositories/firms'
import { insertParticipation } from '@server/repositories/participations'
import { findProject } from '@server/repositories/projects'
import { insertRevision } from '@server/repositories/revisions'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope, FirmTransaction } from '@server/repositories/transaction'
import { authoriseInFirm, authoriseRevision } from '../authorise'
import { notFound } from '../refusals'
import { fillTemplate } from '../templates/fillTemplate'
import type { TemplateLibrary } from '../templates/library'
import { copyAuthorship, readStoredSheet } from './storedSheet'
import { readWhole } from './readCalculation'
import type { WholeCalculation } from './readCalculation'

/** A new calculation, begun empty, from a template or as a copy. Its maker is its preparer. */
export const createCalculation = (
  scope: FirmScope,
  templates: TemplateLibrary,
  { beginning, ...block }: NewCalculation,
): Promise<WholeCalculation> =>
  createWith(scope, block, beginning.kind, (tx) => firstContent(tx, templates, beginning))

/** A new calculation with the content of a sheet that was read from its text form. */
export const createCalculationFromSheet = (
  scope: FirmScope,
  block: Omit<NewCalculation, 'beginning'>,
  sheet: Sheet,
): Promise<WholeCalculation> =>
  createWith(scope, block, 'text', (tx) =>
    Promise.resolve({ sheet, authorship: linesBy(sheet, tx.scope.accountId) }),
  )

/**
 * The calculation with its revision A and its document, whose first content is written here, once, in
 * the same transaction: a document that clients fill has everything twice.
 */
const createWith = (
  scope: FirmScope,
  { projectId, title, dueOn }: Omit<NewCalculation, 'beginning'>,
  from: Beginning['kind'] | 'text',
  content: (tx: FirmTransaction) => Promise<FirstContent>,
): Promise<WholeCalculation> => {
  authoriseInFirm(scope, 'create-calculation')
  return inTransaction(scope, async (tx) => {
    if ((await findProject(tx, projectId)) === null) throw notFound('project')
    const documentId = randomUUID()
    const first = await content(tx)
    const id = randomUUID()
    const revisionId = randomUUID()
    const number = await takeNumber(tx)
    await insertCalculation(tx, { id, projectId, number, title, dueOn })
    await insertParticipation(tx, {
      id: randomUUID(),
      calculationId: id,
      accountId: scope.accountId,
      part: 'preparer',
      note: '',
    })
    await insertRevision(tx, { id: revisionId, calculationId: id, letter: 'A', ordinal: 1, reason: '' })
    await insertDocument(tx, { id: documentId, revisionId, format: FORMAT_VERSION })
    await storeFirst(tx, documentId, first)
    await recordEvent(tx, { action: 'calculation.create', subjectId: id, details: { number, from } })
    return readWhole(tx, id)
  })
}

interface FirstContent {
  sheet: Sheet
  authorship: ContributionRow[]
}

const emptySheet = (): Sheet => ({
  front: { purpose: '', method: '', conclusion: '', unitSystem: 'SI', language: 'en', sources: {} },
  blocks: [],
})

const firstContent = async (
  tx: FirmTransaction,
  templates: TemplateLibrary,
  beginning: Beginning,
): Promise<FirstContent> => {
  if (beginning.kind === 'empty') return { sheet: emptySheet(), authorship: [] }
  if (beginning.kind === 'copy') {
    const { revision } = await authoriseRevision(tx, beginning.revisionId, 'copy')
    const stored = await readStoredSheet(tx, revision.id)
    return { sheet: stored.sheet, authorship: await copyAuthorship(tx, stored.documentId) }
  }
  const template = templates.find(beginning.template)
  if (template === undefined) throw notFound('template')
  const sheet = fillTemplate(template, beginning.givens)
  return { sheet, authorship: linesBy(sheet, tx.scope.accountId) }
}

/** Who uses a template answers for its lines as for lines of their own. */
const linesBy = (sheet: Sheet, accountId: string): ContributionRow[] =>
  sheet.blocks
    .flatMap((block) => (block.type === 'line' ? [block.line] : []))
    .map((line, position) => ({
      head: 1,
      position,
      accountId,
      subject: 'line',
      subjectId: line.id,
      field: '',
      before: null,
      after: JSON.stringify(line),
    }))

const storeFirst = async (
  tx: FirmTransaction,
  documentId: string,
  { sheet, authorship }: FirstContent,
): Promise<void> => {
  const bytes = Buffer.from(encodeSheet(sheet))
  await raiseHead(tx, documentId, 1, 1, bytes.length)
  await insertUpdates(tx, documentId, [{ head: 1, accountId: null, clientId: null, bytes }])
  await insertContributions(tx, documentId, authorship)
}
