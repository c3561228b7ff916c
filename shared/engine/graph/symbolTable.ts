/**
 * Who defines a symbol, who reads it, and whose reading depended on whether it is defined: the edges
 * of the graph, in both directions, kept up line by line.
 */
import { NearNames, areNear } from './nearNames'

/** Where the current number of a symbol or member stands; compiled expressions keep it and read it. */
export interface Register {
  si: number
}

export interface SymbolEntry<N> {
  readonly name: string
  /** In reading order; only the first one counts. */
  definers: N[]
  /** Most results are read by nobody. */
  readers?: Set<N>
  /** Lines that must be read again when it comes or goes; most symbols have none. */
  askers?: Set<N>
  /** Its own number. */
  register: Register
  /** Numbers of its members, where it has some. */
  members?: Map<string, Register>
}

/** `S1.tau_max` belongs to the symbol `S1`. */
export const ownerOf = (name: string): string => {
  const point = name.indexOf('.')
  return point < 0 ? name : name.slice(0, point)
}

/** `tau_max` of `S1.tau_max`; empty for a plain symbol. */
export const memberOf = (name: string): string => {
  const point = name.indexOf('.')
  return point < 0 ? '' : name.slice(point + 1)
}

const isRead = (entry: { readers?: Set<unknown> }): boolean => (entry.readers?.size ?? 0) > 0

export class SymbolTable<N> {
  private readonly entries = new Map<string, SymbolEntry<N>>()
  /** Read somewhere, defined nowhere. */
  private readonly unknown = new Set<SymbolEntry<N>>()
  /** Made when the first misspelt name asks for it. */
  private nearNames: NearNames | undefined

  /** Definitions that came or went since the last call of `takeFlipped`, with what was before. */
  private flipped = new Map<SymbolEntry<N>, boolean>()

  get(name: string): SymbolEntry<N> | undefined {
    return this.entries.get(name)
  }

  entry(name: string): SymbolEntry<N> {
    const known = this.entries.get(name)
    if (known) return known
    const entry = { name, definers: [], register: { si: NaN } }
    this.entries.set(name, entry)
    return entry
  }

  isDefined(name: string): boolean {
    return (this.entries.get(name)?.definers.length ?? 0) > 0
  }

  /** The number of a symbol or of a member, by its full name. */
  register(name: string): Register {
    const member = memberOf(name)
    const entry = this.entry(ownerOf(name))
    if (member === '') return entry.register
    entry.members ??= new Map()
    const known = entry.members.get(member)
    if (known) return known
    const register = { si: NaN }
    entry.members.set(member, register)
    return register
  }

  define(name: string, node: N, order: (a: N, b: N) => number): SymbolEntry<N> {
    const entry = this.entry(name)
    this.noteFlip(entry)
    entry.definers.push(node)
    if (entry.definers.length > 1) entry.definers.sort(order)
    else this.appeared(entry)
    return entry
  }

  undefine(name: string, node: N): SymbolEntry<N> {
    const entry = this.entry(name)
    this.noteFlip(entry)
    entry.definers = entry.definers.filter((definer) => definer !== node)
    if (entry.definers.length === 0) this.vanished(entry)
    return entry
  }

  read(name: string, node: N): void {
    const entry = this.entry(ownerOf(name))
    entry.readers ??= new Set()
    entry.readers.add(node)
    if (entry.definers.length === 0) this.unknown.add(entry)
  }

  unread(name: string, node: N): void {
    const entry = this.entries.get(ownerOf(name))
    if (!entry) return
    entry.readers?.delete(node)
    this.sweep(entry)
  }

  ask(name: string, node: N): void {
    const entry = this.entry(name)
    entry.askers ??= new Set()
    entry.askers.add(node)
  }

  unask(name: string, node: N): void {
    const entry = this.entries.get(name)
    if (!entry) return
    entry.askers?.delete(node)
    this.sweep(entry)
  }

  /** Symbols that were defined and are not, or were not and are. */
  takeFlipped(): SymbolEntry<N>[] {
    const flipped = [...this.flipped].filter(([entry, before]) => before !== entry.definers.length > 0)
    this.flipped = new Map()
    return flipped.map(([entry]) => entry)
  }

  /** Names read but nowhere defined whose suggestions change when `name` comes or goes. */
  unknownNear(name: string): SymbolEntry<N>[] {
    return [...this.unknown].filter((entry) => areNear(entry.name, name))
  }

  near(name: string): string[] {
    if (!this.nearNames) {
      this.nearNames = new NearNames()
      for (const entry of this.entries.values()) if (entry.definers.length > 0) this.nearNames.add(entry.name)
    }
    return this.nearNames.near(name)
  }

  private noteFlip(entry: SymbolEntry<N>): void {
    if (!this.flipped.has(entry)) this.flipped.set(entry, entry.definers.length > 0)
  }

  private appeared(entry: SymbolEntry<N>): void {
    this.unknown.delete(entry)
    this.nearNames?.add(entry.name)
  }

  private vanished(entry: SymbolEntry<N>): void {
    if (isRead(entry)) this.unknown.add(entry)
    this.nearNames?.remove(entry.name)
    this.sweep(entry)
  }

  private sweep(entry: SymbolEntry<N>): void {
    if (!isRead(entry)) this.unknown.delete(entry)
    const isIdle = entry.definers.length === 0 && !isRead(entry) && (entry.askers?.size ?? 0) === 0
    if (isIdle && this.entries.get(entry.name) === entry) this.entries.delete(entry.name)
  }
}
