/** Brings one line up to date, from the stage on at which it is out of date. */
import type { LibraryFunction, LineId, LineResult, LooseProblem, Problem, Settings } from '../contracts'
import { repeatedLine } from '../graph/problems'
import { memberOf, ownerOf, type SymbolTable } from '../graph/symbolTable'
import { isError } from './expressionReading'
import { absentMembersOf, linkProblemsOf, nameProblemsOf } from './names'
import { same } from './same'
import {
  isDefiner,
  nothingPublished,
  stale,
  type Published,
  type SheetNode,
  type Standing,
} from './sheetNode'
import type { CheckScope, Outcome, Publication, QuantityType } from './stages'

/** Shared, since none of it is ever changed in place: most lines wait for nobody. */
const nobody: string[] = []
const nothingComputed: Outcome = { problems: [] }
const nothingWrong: Problem[] = []

/** What the readers of a line must do again. */
export type Renewal = (typeof stale)['nothing' | 'numbers' | 'types']

export class Refresh {
  private readonly scope: CheckScope

  constructor(
    private readonly symbols: SymbolTable<SheetNode>,
    functions: ReadonlyMap<string, LibraryFunction>,
    settings: Settings,
  ) {
    const definer = (symbol: string) => symbols.get(symbol)?.definers[0]
    const publication = (symbol: string): Publication | undefined => definer(symbol)?.published.publication
    const typeOf = (name: string): QuantityType | undefined => {
      const point = name.indexOf('.')
      const found = publication(point < 0 ? name : name.slice(0, point))
      if (found?.type === 'quantity') return point < 0 ? found.quantity : undefined
      return found?.type === 'analysis' ? found.members.get(memberOf(name)) : undefined
    }
    this.scope = {
      settings,
      functions,
      publication,
      typeOf,
      dimensionOfSymbol: (name) => typeOf(name)?.dimension,
      unitOfSymbol: (name) => typeOf(name)?.unit,
      register: (name) => symbols.register(name),
      shownValue: (name) => {
        const result = definer(ownerOf(name))?.result
        const member = memberOf(name)
        return member === '' ? result?.value : result?.analysis?.members[member]
      },
      along: (name) => {
        const along = definer(ownerOf(name))?.outcome.alongFunctions?.[memberOf(name)]
        if (!along) throw new Error(`Nothing is known along ${name}`)
        return along
      },
      solved: (symbol) => definer(symbol)?.outcome.solved,
    }
  }

  setSettings(settings: Settings): void {
    this.scope.settings = settings
  }

  /** Answers what its readers must do again: nothing, numbers, or types. */
  refresh(node: SheetNode): Renewal {
    const from = node.stale
    node.stale = stale.nothing
    if (from >= stale.links) node.linkProblems = linkProblemsOf(node, this.symbols)
    if (from >= stale.types) {
      node.nameProblems = nameProblemsOf(node, this.symbols)
      node.checked = node.reading.check(this.scope)
      node.standing = this.standingOf(node)
    }
    const waitsFor = this.waitsFor(node)
    const isReady = waitsFor.length === 0 && !node.circle && !node.standing.isBlocked
    node.outcome = isReady ? this.outcomeOf(node) : nothingComputed
    node.result = this.resultOf(node, waitsFor)
    if (isDefiner(node)) return this.publish(node, waitsFor)
    node.published = nothingPublished
    return stale.nothing
  }

  private outcomeOf(node: SheetNode): Outcome {
    const problems = absentMembersOf(node, this.symbols)
    return problems.length > 0 ? { problems } : (node.checked.evaluate?.() ?? nothingComputed)
  }

  /** What holds of a line before its numbers are known. */
  private standingOf(node: SheetNode): Standing {
    const { line, linkProblems, reading, nameProblems, checked } = node
    const reads = this.definedAmong(reading.reads)
    const isSound =
      linkProblems.length + reading.problems.length + nameProblems.length + checked.problems.length === 0
    if (isSound && line.repeats === undefined) return { problems: nothingWrong, isBlocked: false, reads }
    const repeats = line.repeats === undefined ? [] : [repeatedLine(node.id)]
    const loose = [...repeats, ...linkProblems, ...reading.problems, ...nameProblems, ...checked.problems]
    return {
      problems: loose.map((problem) => ofLine(problem, node.id)),
      isBlocked: loose.some(isBlocking),
      reads,
    }
  }

  /** What stands in the way upstream: the symbols at the roots, not those in between. */
  private waitsFor(node: SheetNode): string[] {
    let roots = nobody
    for (const name of node.reading.reads) {
      const definer = this.symbols.get(ownerOf(name))?.definers[0]
      if (!definer || definer === node || node.circle?.symbols.has(ownerOf(name))) continue
      for (const root of definer.published.roots) if (!roots.includes(root)) roots = [...roots, root]
    }
    return roots
  }

  private definedAmong(names: readonly string[]): string[] {
    const isDefined = (name: string) => this.symbols.isDefined(ownerOf(name))
    return names.every(isDefined) ? (names as string[]) : names.filter(isDefined)
  }

  private publish(node: SheetNode, waitsFor: string[]): Renewal {
    const { checked, outcome, published: before, symbol = '' } = node
    const publication = node.circle ? undefined : checked.publication
    const { numbers } = outcome
    const isReadable = numbers !== undefined || publication?.type === 'nothing'
    const now: Published = {
      publication,
      numbers,
      roots: isReadable ? nobody : node.result.state === 'waits' ? waitsFor : [symbol],
    }
    node.published = now
    const areNumbersNew = !sameNumbers(before.numbers, numbers) || outcome.alongFunctions !== undefined
    if (numbers && areNumbersNew) this.store(symbol, numbers)
    if (!samePublication(before.publication, publication)) return stale.types
    return areNumbersNew || !same(before.roots, now.roots) ? stale.numbers : stale.nothing
  }

  private store(symbol: string, numbers: Readonly<Record<string, number>>): void {
    for (const member in numbers) {
      this.symbols.register(member === '' ? symbol : `${symbol}.${member}`).si = numbers[member] ?? NaN
    }
  }

  private resultOf(node: SheetNode, waitsFor: string[]): LineResult {
    const { outcome, checked, line, standing } = node
    const isStopped = standing.isBlocked || outcome.problems.some(isBlocking)
    const result: LineResult = {
      id: node.id,
      symbol: node.symbol ?? line.symbol,
      state: isStopped
        ? 'problem'
        : line.kind === 'inert'
          ? 'inert'
          : waitsFor.length > 0
            ? 'waits'
            : 'value',
      waitsFor,
      problems:
        outcome.problems.length === 0
          ? standing.problems
          : [...standing.problems, ...outcome.problems.map((problem) => ofLine(problem, node.id))],
      reads: standing.reads,
    }
    if (outcome.value) result.value = outcome.value
    if (outcome.criterion) result.criterion = outcome.criterion
    if (outcome.analysis) result.analysis = outcome.analysis
    if (checked.empirical) result.empirical = true
    return result
  }
}

const ofLine = (problem: LooseProblem, lineId: LineId): Problem => ({
  ...problem,
  lineId,
  severity: problem.severity ?? 'error',
})

/** A contested line computes with the version that stands in it; everything else that is wrong stops it. */
const isBlocking = (problem: LooseProblem): boolean => isError(problem) && problem.code !== 'contested'

const sameNumbers = (a: Published['numbers'], b: Published['numbers']): boolean =>
  a !== undefined && b !== undefined && '' in a && '' in b ? Object.is(a[''], b['']) : same(a, b)

const samePublication = (a: Publication | undefined, b: Publication | undefined): boolean => {
  if (a === b) return true
  if (a?.type !== 'quantity' || b?.type !== 'quantity') return same(a, b)
  return a.quantity.unit.text === b.quantity.unit.text && same(a.quantity.dimension, b.quantity.dimension)
}
