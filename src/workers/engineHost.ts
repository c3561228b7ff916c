import type {
  Analysis,
  AnalysisSpec,
  Figure,
  FigureFrame,
  LineId,
  LineResult,
  Presentation,
  SheetEngine,
} from '@shared/engine/contracts'
import { presentWorking } from './presentWorking'
import type { DrawnFigure, EngineAnswer, EngineRequest, ShownWorking, Trial } from './engineMessages'

export interface EngineHostParts {
  engine: SheetEngine
  analyses: ReadonlyMap<string, Analysis>
  /** Shows an SI number in figures, in the unit system of the sheet. */
  show: (unitSystem: 'SI' | 'US') => FigureFrame['show']
  answer: (message: EngineAnswer) => void
}

const readingsOf = (reading: NonNullable<Figure['reading']>, show: FigureFrame['show']): string[] =>
  reading.stations.map((station, index) => {
    const at = show(station, reading.stationDimension, reading.stationUnit)
    const values = reading.curves.map(
      (curve) => `${curve.label} ${show(curve.values[index] ?? 0, curve.dimension, curve.unit)}`,
    )
    return `${reading.label} ${at}: ${values.join(', ')}`
  })

/**
 * Serves one sheet: takes requests, answers what differs. Mathematics is made only for lines in view,
 * so that a sheet of a thousand lines costs what one sees of it.
 */
export const createEngineHost = ({ engine, analyses, show, answer }: EngineHostParts) => {
  const inView = new Set<LineId>()
  let unitSystem: 'SI' | 'US' = 'SI'

  const present = (ids: Iterable<LineId>): Presentation[] =>
    [...ids].flatMap((id) => engine.present(id) ?? [])

  const apply = (request: Extract<EngineRequest, { ask: 'apply' }>): void => {
    unitSystem = request.changes.settings?.unitSystem ?? unitSystem
    const { lines, quotes } = engine.apply(request.changes)
    // A new unit system changes how every line reads, even where no number did.
    const touched = request.changes.settings
      ? inView
      : lines.map((line) => line.id).filter((id) => inView.has(id))
    answer({
      answer: 'results',
      number: request.number,
      lines,
      quotes,
      presentations: present(touched),
      nomenclature: engine.nomenclature(),
    })
  }

  const tryLine = (request: Extract<EngineRequest, { ask: 'try' }>): Trial | null => {
    const { after, line } = request
    engine.apply({ changes: [{ id: line.id, after, line }] })
    const result: LineResult | undefined = engine.result(line.id)
    const presentation = engine.present(line.id)
    engine.apply({ changes: [{ id: line.id, after, line: null }] })
    return result ? { result, presentation } : null
  }

  const draw = (request: Extract<EngineRequest, { ask: 'draw' }>): DrawnFigure | null => {
    const { width, focused, unsolved } = request
    const shown = show(unitSystem)
    const solved = engine.result(request.id)?.analysis
    const analysis = analyses.get(solved?.kind ?? unsolved?.kind ?? '')
    if (!analysis) return null
    if (!solved) {
      if (!unsolved) return null
      return { figure: analysis.sketch(unsolved.inputs, { width, focused, show: shown }), readings: [] }
    }
    const figure = analysis.figure(
      { figure: solved.figure, outputs: solved.outputs },
      { width, focused, show: shown },
    )
    return { figure, readings: figure.reading ? readingsOf(figure.reading, shown) : [] }
  }

  const working = (id: LineId): ShownWorking | null => {
    const solved = engine.result(id)?.analysis
    const analysis = analyses.get(solved?.kind ?? '')
    return solved && analysis ? presentWorking(analysis, solved, unitSystem) : null
  }

  const specs = (): AnalysisSpec[] => [...analyses.values()].map(({ spec }) => spec)

  const serve = (request: EngineRequest): void => {
    switch (request.ask) {
      case 'apply':
        return apply(request)
      case 'show': {
        const fresh = request.ids.filter((id) => !inView.has(id))
        fresh.forEach((id) => inView.add(id))
        return answer({ answer: 'presentations', presentations: present(fresh) })
      }
      case 'hide':
        return request.ids.forEach((id) => inView.delete(id))
      case 'try':
        return answer({ answer: 'trial', number: request.number, trial: tryLine(request) })
      case 'draw':
        return answer({ answer: 'figure', number: request.number, figure: draw(request) })
      case 'working':
        return answer({ answer: 'working', number: request.number, working: working(request.id) })
      case 'specs':
        return answer({ answer: 'specs', number: request.number, specs: specs() })
    }
  }

  /** Never throws: a fault is answered, so that the sheet can say that its values are not current. */
  return (request: EngineRequest): void => {
    try {
      serve(request)
    } catch (fault) {
      answer({ answer: 'fault', message: fault instanceof Error ? fault.message : String(fault) })
    }
  }
}
