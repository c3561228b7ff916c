/** The evaluating thread: one sheet, one answer. It may be ended at any moment. */
import { parentPort, workerData } from 'node:worker_threads'
import { evaluateSheet } from '@shared/pipeline'
import type { EvaluationRequest, SheetEvaluation } from './messages'

const { sheet, present } = workerData as EvaluationRequest
const { lines, quotes, engine } = evaluateSheet(sheet)
const answer: SheetEvaluation = {
  lines,
  quotes,
  presentations: present ? lines.flatMap(({ id }) => engine.present(id) ?? []) : [],
  nomenclature: engine.nomenclature(),
}
parentPort?.postMessage(answer)
