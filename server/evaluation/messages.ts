import type { Evaluation } from '@shared/pipeline'
import type { Sheet } from '@shared/sheet/sheet'

/** What crosses to the evaluating thread and back; all of it plain data. */
export interface EvaluationRequest {
  sheet: Sheet
  /** Whether each line's presentation is wanted, too. */
  present: boolean
}

export type SheetEvaluation = Pick<Evaluation, 'lines' | 'quotes'> & {
  presentations: Presentation[]
  nomenclature: ReturnType<Evaluation['engine']['nomenclature']>
}

type Presentation = NonNullable<ReturnType<Evaluation['engine']['present']>>
