import type { Node as PageNode } from '@tiptap/pm/model'
import type { EditorView, NodeView } from '@tiptap/pm/view'
import { computed, effect, stop } from 'vue'
import type { Line } from '@shared/sheet/kinds'
import { drawMark } from '../mark'
import { kindWords, type Desk, type HostPart } from '../desk'
import { button, element } from '../element'
import { drawKind } from './index'
import { isWiderThanHang, symbolShown } from './parts'
import { drawProblems } from './problems'
import { engineState } from './state'

/**
 * A line on the page as static DOM: no component lives in it until its fields are opened, so that a
 * sheet of five hundred lines types like an empty one. It draws itself again when what it read changed.
 */
export class LineView implements NodeView {
  readonly dom: HTMLElement
  private readonly symbol = element('div', { class: 'line__symbol' })
  private readonly body = element('div', { class: 'line__body' })
  private readonly speech = element('p', { class: 'spoken' })
  private readonly noteRow = element('div', { class: 'line__note-row' })
  private readonly remarks = element('div', { class: 'line__remarks' })
  private readonly problems = element('div', { class: 'line__problems' })
  private readonly source = element('div', { class: 'line__source' })
  private readonly mark = element('div', { class: 'line__mark' })
  private readonly results = element('div', { class: 'line__results' })
  private readonly fields = element('div', { class: 'line__fields' })
  private readonly actions: HTMLElement
  private readonly drawing: ReturnType<typeof effect>
  private isQueued = false
  private readonly id: string
  private readonly number = computed(() => this.desk.numberOf(this.id))
  private readonly isOpen = computed(() => this.desk.openLine() === this.id)
  private readonly made = computed(() => this.desk.madeOf(this.id))
  /** Name, initials and colour of a colleague whose pen is here; a text, so that sameness is seen. */
  private readonly colleague = computed(() => {
    const holder = this.desk.holder(this.id)
    return holder && !holder.isMine ? [holder.name, holder.initials, holder.colour].join('\n') : ''
  })
  private hasFields = false
  private hasResults = false

  constructor(
    private node: PageNode,
    view: EditorView,
    private readonly position: () => number | undefined,
    private readonly desk: Desk,
  ) {
    this.id = String(node.attrs.id ?? '')
    this.actions = this.makeActions(view)
    const content = element(
      'div',
      { class: 'line__content' },
      this.speech,
      this.body,
      this.results,
      this.noteRow,
      this.remarks,
      this.problems,
      this.fields,
    )
    this.dom = element(
      'div',
      { class: 'line', 'data-line': this.id, role: 'group' },
      this.symbol,
      content,
      this.source,
      this.mark,
    )
    this.dom.contentEditable = 'false'
    desk.watchView(this.dom)
    this.drawing = effect(() => this.draw(), { scheduler: () => this.drawSoon() })
  }

  private makeActions(view: EditorView): HTMLElement {
    const edit = button('Edit', 'text-button line__edit', () => this.desk.edit(this.id))
    const insert = button('Insert line', 'text-button', () => this.desk.showInsertMenu(this.id, insert))
    const more = button('More', 'text-button', () => this.desk.showMoreMenu(this.id, more))
    insert.setAttribute('aria-haspopup', 'menu')
    more.setAttribute('aria-haspopup', 'menu')
    const bar = element(
      'div',
      { class: 'line__actions', role: 'toolbar', 'aria-label': 'Line' },
      edit,
      insert,
      more,
    )
    const buttons = [edit, insert, more]
    // One stop for Tab, arrows within: three lines' worth of buttons would hold the keyboard in the sheet.
    buttons.forEach((each) => (each.tabIndex = -1))
    bar.addEventListener('keydown', (event) => {
      const at = buttons.findIndex((each) => each === document.activeElement)
      const step = event.key === 'ArrowRight' ? 1 : event.key === 'ArrowLeft' ? -1 : 0
      if (step !== 0) {
        buttons[(at + step + buttons.length) % buttons.length]?.focus()
        event.preventDefault()
      }
      if (event.key === 'Escape') view.focus()
      event.stopPropagation()
    })
    return bar
  }

  private drawSoon(): void {
    if (this.isQueued) return
    this.isQueued = true
    queueMicrotask(() => {
      this.isQueued = false
      // Told of many changes, drawn only for those that are its own.
      if (this.drawing.effect.dirty) this.drawing()
    })
  }

  private draw(): void {
    const line = this.desk.line(this.id)
    if (!line) return this.drawMissing()
    const result = this.desk.result(this.id)
    const presentation = this.desk.presentation(this.id)
    const { body, remarks = [], speech } = drawKind(line, this.desk)
    const number = this.number.value
    this.dom.className = this.classes(line)
    this.dom.setAttribute('aria-label', `${number} ${kindWords[line.kind]} ${line.symbol}`.trim())
    this.symbol.replaceChildren(
      element('span', { class: 'line__number' }, number),
      line.kind === 'criterion'
        ? element('span', { class: 'line__symbol-tex' }, line.symbol)
        : symbolShown(presentation, line),
    )
    this.body.replaceChildren(...body)
    this.remarks.replaceChildren(...remarks)
    this.speech.textContent = presentation?.speech ?? speech
    this.drawNote(line)
    const problems = result?.problems ?? []
    this.problems.replaceChildren(
      ...(problems.length > 0 ? [drawProblems(line, problems, this.desk)] : []),
      ...this.contested(line),
      ...this.justMade(),
    )
    this.drawMark(line)
    this.setStops()
    this.offerHosts(line)
  }

  /** An atom whose fields have not arrived, or were dropped: it holds its place and says so. */
  private drawMissing(): void {
    this.dom.className = 'line line--missing'
    this.body.replaceChildren(element('p', { class: 'line__basis' }, 'This line has no content.'))
    for (const part of [this.symbol, this.remarks, this.problems, this.mark, this.source])
      part.replaceChildren()
    this.noteRow.replaceChildren(...(this.desk.mayEdit() ? [this.actions] : []))
  }

  private classes(line: Line): string {
    const selected = this.dom.classList.contains('line--selected') ? ' line--selected' : ''
    const open = this.isOpen.value ? ' line--open' : ''
    const changed = this.desk.justChanged(this.id) ? ' line--changed' : ''
    const wide = isWiderThanHang(line.symbol) ? ' line--wide-symbol' : ''
    return `line line--${line.kind}${selected}${open}${changed}${wide}`
  }

  private drawNote(line: Line): void {
    const title = line.kind === 'criterion' ? line.title : ''
    const note = [title, line.note].filter(Boolean).join('. ')
    const source = 'source' in line && line.source ? this.desk.sourceShown(line.source) : ''
    this.noteRow.className = `line__note-row${note || source ? '' : ' line__note-row--empty'}`
    this.noteRow.replaceChildren(
      element(
        'p',
        { class: 'line__note' },
        note,
        source && element('span', { class: 'line__source-inline' }, note ? ' ' : '', `[${source}]`),
      ),
      ...(this.desk.mayEdit() ? [this.actions] : []),
    )
    this.source.replaceChildren(source)
  }

  private drawMark(line: Line): void {
    const state = engineState(line, this.desk.result(this.id))
    const [name = '', initials = '', colour = ''] = this.colleague.value.split('\n')
    const pen =
      name !== '' &&
      element(
        'span',
        { class: 'line__pen', style: `--pen: ${colour}`, title: `${name} is writing here` },
        initials,
      )
    this.mark.replaceChildren(
      ...(state
        ? [
            element(
              'span',
              { class: `line__state line__state--${state.state}` },
              drawMark(state.state),
              element('span', { class: 'line__state-word' }, state.word),
            ),
          ]
        : []),
      ...(pen ? [pen] : []),
    )
  }

  private justMade(): HTMLElement[] {
    const kind = this.made.value
    if (!kind) return []
    const article = kind === 'analysis' ? 'an' : 'a'
    return [
      element(
        'p',
        { class: 'line__made' },
        `Made ${article} ${kindWords[kind]}. `,
        button('Keep as text', 'text-button', () => this.desk.keepAsText()),
      ),
    ]
  }

  private contested(line: Line): HTMLElement[] {
    const { contested } = line
    if (!contested) return []
    const other = Object.entries(contested.fields)
      .map(([field, value]) => `${field}: ${typeof value === 'string' ? value : JSON.stringify(value)}`)
      .join('; ')
    return [
      element(
        'div',
        { class: 'line__contested' },
        element('p', {}, `${contested.by} wrote this line while away. Beside what stands here: ${other}.`),
        ...(this.desk.mayEdit()
          ? [
              button('Keep what stands here', 'text-button', () =>
                this.desk.settleContested(this.id, 'theirs'),
              ),
              button(`Take what ${contested.by} wrote`, 'text-button', () =>
                this.desk.settleContested(this.id, 'mine'),
              ),
            ]
          : []),
      ),
    ]
  }

  private offerHosts(line: Line): void {
    const wantsFields = this.isOpen.value
    this.hasFields = this.settleHost('fields', this.fields, this.hasFields, wantsFields)
    this.hasResults = this.settleHost('results', this.results, this.hasResults, line.kind === 'analysis')
  }

  private settleHost(part: HostPart, host: HTMLElement, isOffered: boolean, isWanted: boolean): boolean {
    if (isWanted && !isOffered) this.desk.offerHost(part, this.id, host)
    if (!isWanted && isOffered) this.desk.withdrawHost(part, this.id, host)
    return isWanted
  }

  update(node: PageNode): boolean {
    if (node.type !== this.node.type || String(node.attrs.id ?? '') !== this.id) return false
    this.node = node
    return true
  }

  selectNode(): void {
    this.dom.classList.add('line--selected')
    this.setStops()
  }

  deselectNode(): void {
    this.dom.classList.remove('line--selected')
    this.setStops()
  }

  /** Tab stops at the buttons of the selected line and at no other: it must leave the sheet soon. */
  private setStops(): void {
    const stop = this.dom.classList.contains('line--selected') ? 0 : -1
    const first = this.actions.querySelector('button')
    if (first) first.tabIndex = stop
    this.problems.querySelectorAll('button').forEach((each) => (each.tabIndex = stop))
  }

  /** Fields, buttons and readings are theirs; a press anywhere else on the line selects it. */
  stopEvent(event: Event): boolean {
    const target = event.target
    if (!(target instanceof Element)) return false
    if (this.fields.contains(target)) return true
    const control = target.closest('button, a, input, select, textarea, summary, [tabindex="0"]')
    return control !== null && control !== this.dom && this.dom.contains(control)
  }

  ignoreMutation(): boolean {
    return true
  }

  destroy(): void {
    stop(this.drawing)
    this.isQueued = true
    this.desk.unwatchView(this.dom)
    this.settleHost('fields', this.fields, this.hasFields, false)
    this.settleHost('results', this.results, this.hasResults, false)
  }

  /** For commands that act on a view's own place. */
  at(): number | undefined {
    return this.position()
  }
}
