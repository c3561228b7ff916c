/**
 * The lines of a sheet with their order and their symbols. Takes changes one by one, reads texts again
 * where they or the meaning of their words changed, and collects which lines are out of date.
 */
import type {
  Analysis,
  Change,
  EngineLine,
  LibraryFunction,
  LineId,
  LineResult,
  LooseProblem,
} from '../contracts'
import { invalidSymbol } from '../graph/problems'
import { compare, ReadingOrder } from '../graph/readingOrder'
import { SymbolTable, type SymbolEntry } from '../graph/symbolTable'
import { readSymbolName } from '../parse/symbolName'
import { readLine } from './lines'
import { same } from './same'
import { emptyReading, isDefiner, lacks, nothingPublished, stale, type SheetNode } from './sheetNode'
import type { Reading } from './stages'

export interface EngineParts {
  analyses: ReadonlyMap<string, Analysis>
  functions: ReadonlyMap<string, LibraryFunction>
}

/** What a line has until it is looked at: shared, since none of it is ever changed in place. */
const none: LooseProblem[] = []
const nothingChecked: SheetNode['checked'] = { problems: none }
const nothingKnown: SheetNode['standing'] = { problems: [], isBlocked: false, reads: [] }
const nothingComputed: SheetNode['outcome'] = { problems: none }
const unseen: LineResult = { id: '', symbol: '', state: 'waits', waitsFor: [], problems: [], reads: [] }

const inReadingOrder = (a: SheetNode, b: SheetNode): number => compare(a.place, b.place)

export class SheetLines {
  readonly nodes = new Map<LineId, SheetNode>()
  readonly order = new ReadingOrder<SheetNode>()
  readonly symbols = new SymbolTable<SheetNode>()
  /** Out of date since the last `settle`. */
  private dirty = new Set<SheetNode>()
  /** Symbols whose quotes in the prose are out of date. */
  private touched = new Set<string>()
  /** Lines whose texts are to be read, after all definitions of this change are known. */
  private unread = new Set<SheetNode>()

  constructor(private readonly parts: EngineParts) {}

  /** Integrates changes; answers the lines to refresh and the symbols that changed hands. */
  integrate(changes: readonly Change[]): { dirty: Set<SheetNode>; touched: Set<string> } {
    for (const change of changes) this.take(change)
    for (const entry of this.symbols.takeFlipped()) this.meaningChanged(entry)
    for (const node of this.unread) this.read(node)
    const found = { dirty: this.dirty, touched: this.touched }
    this.dirty = new Set()
    this.touched = new Set()
    this.unread = new Set()
    return found
  }

  private take({ id, after, line }: Change): void {
    const node = this.nodes.get(id)
    if (!line) {
      if (node) this.remove(node)
    } else if (!node) this.insert(id, after, line)
    else {
      const before = node.place.before?.item.id ?? null
      if (before !== after && after !== id) this.move(node, after)
      if (!same(node.line, line)) this.rewrite(node, line)
    }
  }

  /** Behind a line; an unknown one means the end. */
  private placeAfter(node: SheetNode, after: LineId | null): void {
    const before = after === null ? null : (this.nodes.get(after)?.place ?? this.order.end())
    node.place = this.order.insert(node, before)
  }

  private insert(id: LineId, after: LineId | null, line: EngineLine): void {
    const node: SheetNode = {
      id,
      line,
      // Given in the next step; the place needs the node.
      place: undefined as unknown as SheetNode['place'],
      reading: emptyReading,
      linkProblems: none,
      nameProblems: none,
      checked: nothingChecked,
      standing: nothingKnown,
      outcome: nothingComputed,
      stale: stale.links,
      published: nothingPublished,
      result: unseen,
    }
    this.placeAfter(node, after)
    this.nodes.set(id, node)
    this.nameIt(node)
    this.unread.add(node)
  }

  private remove(node: SheetNode): void {
    this.nodes.delete(node.id)
    this.forgetReads(node)
    this.undefine(node)
    this.order.remove(node.place)
    this.dirty.delete(node)
    this.unread.delete(node)
  }

  private move(node: SheetNode, after: LineId | null): void {
    this.order.remove(node.place)
    this.placeAfter(node, after)
    node.defines?.definers.sort(inReadingOrder)
    this.outdated(node)
    if (node.defines) this.handsChanged(node.defines)
  }

  private rewrite(node: SheetNode, line: EngineLine): void {
    const isRenamed = node.line.symbol !== line.symbol || node.line.repeats !== line.repeats
    const isOtherKind = node.line.kind !== line.kind
    node.line = line
    if (isRenamed || isOtherKind) {
      this.undefine(node)
      this.nameIt(node)
    }
    this.unread.add(node)
  }

  /** Reads the symbol and defines it. */
  private nameIt(node: SheetNode): void {
    node.symbol = undefined
    node.symbolProblem = undefined
    const typed = node.line.symbol.trim()
    const mayBeNameless = node.line.kind === 'criterion' || node.line.kind === 'inert'
    if (node.line.repeats !== undefined || (typed === '' && mayBeNameless)) return
    const { name, message } = readSymbolName(typed, this.parts.functions)
    if (name === undefined) node.symbolProblem = invalidSymbol(message, typed === '')
    else {
      node.symbol = name
      node.defines = this.symbols.define(name, node, inReadingOrder)
      this.handsChanged(node.defines)
    }
    this.outdated(node)
  }

  private undefine(node: SheetNode): void {
    if (!node.defines) return
    if (isDefiner(node)) this.touched.add(node.defines.name)
    const entry = this.symbols.undefine(node.defines.name, node)
    node.defines = undefined
    this.handsChanged(entry)
  }

  /** Somebody else may define it now, or stands elsewhere: whoever defines or reads it looks again. */
  private handsChanged(entry: SymbolEntry<SheetNode>): void {
    this.touched.add(entry.name)
    for (const node of entry.definers) this.outdated(node)
    for (const node of entry.readers ?? []) this.outdated(node)
  }

  private outdated(node: SheetNode): void {
    lacks(node, stale.links)
    this.dirty.add(node)
  }

  /** A name came or went: texts that it could have changed are read again, suggestions made again. */
  private meaningChanged(entry: SymbolEntry<SheetNode>): void {
    for (const node of entry.askers ?? []) this.unread.add(node)
    for (const unknown of this.symbols.unknownNear(entry.name)) {
      for (const node of unknown.readers ?? []) this.outdated(node)
    }
  }

  private read(node: SheetNode): void {
    this.forgetReads(node)
    node.reading = node.line.repeats === undefined ? this.readingOf(node) : emptyReading
    for (const name of node.reading.reads) this.symbols.read(name, node)
    for (const name of node.asks ?? []) this.symbols.ask(name, node)
    this.outdated(node)
  }

  private readingOf(node: SheetNode): Reading {
    const isDefined = (name: string): boolean => {
      node.asks ??= new Set()
      node.asks.add(name)
      return this.symbols.isDefined(name)
    }
    const { analyses, functions } = this.parts
    return readLine(node.line, { vocabulary: { isDefined, functions }, analyses })
  }

  private forgetReads(node: SheetNode): void {
    for (const name of node.reading.reads) this.symbols.unread(name, node)
    for (const name of node.asks ?? []) this.symbols.unask(name, node)
    node.asks = undefined
  }
}
