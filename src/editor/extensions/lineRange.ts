import { Extension } from '@tiptap/core'
import { Fragment, Slice, type Node as PageNode, type ResolvedPos } from '@tiptap/pm/model'
import { NodeSelection, Plugin, Selection, TextSelection } from '@tiptap/pm/state'
import type { Transaction } from '@tiptap/pm/state'
import type { Mappable } from '@tiptap/pm/transform'
import { Decoration, DecorationSet } from '@tiptap/pm/view'

/**
 * Whole blocks of the page, from one line to another, both included. The anchor is the first line that
 * was selected, the head the one that moves; both positions stand before a block.
 */
export class BlockRange extends Selection {
  constructor(
    readonly $anchorBlock: ResolvedPos,
    readonly $headBlock: ResolvedPos,
  ) {
    const [$first, $last] =
      $anchorBlock.pos <= $headBlock.pos ? [$anchorBlock, $headBlock] : [$headBlock, $anchorBlock]
    super($first, $last.doc.resolve($last.pos + ($last.nodeAfter?.nodeSize ?? 0)))
    this.visible = false
  }

  static between(doc: PageNode, anchor: number, head: number): BlockRange {
    return new BlockRange(doc.resolve(anchor), doc.resolve(head))
  }

  map(doc: PageNode, mapping: Mappable): Selection {
    const anchor = mapping.mapResult(this.$anchorBlock.pos)
    const head = mapping.mapResult(this.$headBlock.pos)
    const isStanding = (position: number) =>
      doc.resolve(position).depth === 0 && doc.resolve(position).nodeAfter !== null
    if (anchor.deleted || head.deleted || !isStanding(anchor.pos) || !isStanding(head.pos)) {
      return Selection.near(doc.resolve(head.pos))
    }
    return BlockRange.between(doc, anchor.pos, head.pos)
  }

  eq(other: Selection): boolean {
    return (
      other instanceof BlockRange &&
      other.$anchorBlock.pos === this.$anchorBlock.pos &&
      other.$headBlock.pos === this.$headBlock.pos
    )
  }

  override content(): Slice {
    const nodes: PageNode[] = []
    this.$from.doc.nodesBetween(this.from, this.to, (node) => {
      nodes.push(node)
      return false
    })
    return new Slice(Fragment.from(nodes), 0, 0)
  }

  toJSON() {
    return { type: 'blockRange', anchor: this.$anchorBlock.pos, head: this.$headBlock.pos }
  }

  static override fromJSON(doc: PageNode, json: { anchor: number; head: number }): BlockRange {
    return BlockRange.between(doc, json.anchor, json.head)
  }
}

try {
  Selection.jsonID('blockRange', BlockRange)
} catch {
  // The module was loaded again during development: the name is taken by its former self.
}

/** Positions before the top-level blocks that are selected: by a line, a range, or text that spans blocks. */
export const selectedBlocks = (selection: Selection): { position: number; node: PageNode }[] => {
  const doc = selection.$from.doc
  const found: { position: number; node: PageNode }[] = []
  doc.forEach((node, position) => {
    const end = position + node.nodeSize
    const touches = selection.empty
      ? selection.from > position && selection.from < end
      : selection.from < end && selection.to > position
    if (touches) found.push({ position, node })
  })
  return found
}

export const selectedLineIds = (selection: Selection): string[] =>
  selection instanceof NodeSelection || selection instanceof BlockRange
    ? selectedBlocks(selection).flatMap(({ node }) =>
        node.type.name === 'line' ? [String(node.attrs.id)] : [],
      )
    : []

/** Selects the block that begins at a position: a line as a whole, in prose the nearest place for the caret. */
export const selectBlockAt = (transaction: Transaction, position: number, from: 1 | -1): Transaction => {
  const node = transaction.doc.nodeAt(position)
  if (!node) return transaction
  if (node.type.name === 'line')
    return transaction.setSelection(NodeSelection.create(transaction.doc, position))
  const edge = from > 0 ? position : position + node.nodeSize
  return transaction.setSelection(TextSelection.near(transaction.doc.resolve(edge), from))
}

/** Draws the range: its blocks are marked, since the browser has no selection that could show it. */
export const LineRange = Extension.create({
  name: 'lineRange',

  addProseMirrorPlugins() {
    return [
      new Plugin({
        props: {
          decorations: ({ doc, selection }) => {
            if (!(selection instanceof BlockRange)) return null
            return DecorationSet.create(
              doc,
              selectedBlocks(selection).map(({ position, node }) =>
                Decoration.node(position, position + node.nodeSize, { class: 'line--in-range' }),
              ),
            )
          },
        },
      }),
    ]
  },
})
