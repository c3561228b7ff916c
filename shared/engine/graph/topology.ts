/**
 * The order of recomputation. Dirty set, closure, in-degrees, topological order; what is left over
 * stands in a circle or behind one.
 */
export type DependentsOf<N> = (node: N) => Iterable<N>

export interface Recomputation<N> {
  /**
   * Each after everything that it depends on, as far as that changes, too; the members of circles in
   * between, before what merely depends on a circle.
   */
  order: N[]
  /** Each circle whole. */
  circles: N[][]
}

export const recomputation = <N>(dirty: Iterable<N>, dependentsOf: DependentsOf<N>): Recomputation<N> => {
  const waitsFor = inDegrees(closure(dirty, dependentsOf), dependentsOf)
  const order: N[] = []
  for (const [node, open] of waitsFor) if (open === 0) order.push(node)
  release(order, 0, waitsFor, dependentsOf)
  if (order.length === waitsFor.size) return { order, circles: [] }

  const left: N[] = []
  for (const [node, open] of waitsFor) if (open > 0) left.push(node)
  const circles = circlesAmong(left, dependentsOf)
  const released = order.length
  for (const node of circles.flat()) {
    // Nothing can release it any more: a circle is placed whole.
    waitsFor.set(node, Infinity)
    order.push(node)
  }
  release(order, released, waitsFor, dependentsOf)
  return { order, circles }
}

/** Takes what was ordered since `from` as done, and orders whatever waits for nothing else. */
const release = <N>(
  order: N[],
  from: number,
  waitsFor: Map<N, number>,
  dependentsOf: DependentsOf<N>,
): void => {
  for (let place = from; place < order.length; place += 1) {
    for (const dependent of dependentsOf(order[place] as N)) {
      const open = (waitsFor.get(dependent) ?? 0) - 1
      waitsFor.set(dependent, open)
      if (open === 0) order.push(dependent)
    }
  }
}

/** Everything that depends on the dirty ones, these included. */
const closure = <N>(dirty: Iterable<N>, dependentsOf: DependentsOf<N>): Set<N> => {
  const reached = new Set(dirty)
  // A set hands out what is added to it while it is walked.
  for (const node of reached) for (const dependent of dependentsOf(node)) reached.add(dependent)
  return reached
}

const inDegrees = <N>(nodes: Set<N>, dependentsOf: DependentsOf<N>): Map<N, number> => {
  const degrees = new Map<N, number>()
  for (const node of nodes) degrees.set(node, 0)
  for (const node of nodes) {
    for (const dependent of dependentsOf(node)) degrees.set(dependent, (degrees.get(dependent) ?? 0) + 1)
  }
  return degrees
}

/**
 * Strongly connected parts with more than one member, or one that depends on itself.
 * Source: R. Tarjan, Depth-First Search and Linear Graph Algorithms, SIAM J. Comput. 1 (1972); written
 * with its own stack, since a sheet may be a chain of ten thousand lines.
 */
const circlesAmong = <N>(nodes: N[], dependentsOf: DependentsOf<N>): N[][] => {
  const among = new Set(nodes)
  const number = new Map<N, number>()
  const lowest = new Map<N, number>()
  const open: N[] = []
  const isOpen = new Set<N>()
  const circles: N[][] = []

  const enter = (node: N) => {
    number.set(node, number.size)
    lowest.set(node, number.size - 1)
    open.push(node)
    isOpen.add(node)
    return { node, dependents: dependentsOf(node)[Symbol.iterator]() }
  }
  const lower = (node: N, to: number) => lowest.set(node, Math.min(lowest.get(node) ?? to, to))
  const close = (root: N) => {
    const members = open.splice(open.indexOf(root))
    for (const member of members) isOpen.delete(member)
    if (members.length > 1 || [...dependentsOf(root)].includes(root)) circles.push(members)
  }

  for (const start of nodes) {
    if (number.has(start)) continue
    const path = [enter(start)]
    for (let step = path.at(-1); step; step = path.at(-1)) {
      const next = step.dependents.next()
      if (!next.done) {
        const seen = number.get(next.value)
        if (seen === undefined && among.has(next.value)) path.push(enter(next.value))
        else if (seen !== undefined && isOpen.has(next.value)) lower(step.node, seen)
        continue
      }
      path.pop()
      const parent = path.at(-1)
      if (parent) lower(parent.node, lowest.get(step.node) ?? 0)
      if (lowest.get(step.node) === number.get(step.node)) close(step.node)
    }
  }
  return circles
}
