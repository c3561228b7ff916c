/**
 * Reads an expression as typed, before the grammar does: names, numbers with their unit phrases, and everything
 * that the grammar would read otherwise than an engineer. Whoever follows `Reader.read` sees the whole language.
 */
import type { LooseProblem } from '../../errors/problem'
import {
  ambiguousDivision,
  decimalComma,
  joinedNumber,
  limitExceeded,
  mendable,
  numberTooLarge,
  syntax,
} from '../problems'
import { scanUnits } from '../units/scan'
import { readUnit } from '../units/unit'
import {
  isDigit,
  isNamePart,
  isNameStart,
  isPrime,
  isSpace,
  skipSpaces,
  superscriptDigit,
} from './characters'
import { numeralAt, type Numeral } from './numeral'
import { phraseAfter } from './phrases'
import { specialForms, signatureOf } from './specialForms'
import { canonicalName } from './symbolName'
import { newFrame, type Frame, type Leaf, type Lexed } from './tokens'
import { isUnavailable, strayCharacter } from './unavailable'
import type { Vocabulary } from './vocabulary'

export const LONGEST_EXPRESSION = 4000
const MOST_LEAVES = 1000
const DEEPEST = 50

/** Operators by their signs, longest first where one begins another. */
const twoSigns = new Map([
  ['<=', '<='],
  ['>=', '>='],
  ['=<', '<='],
  ['=>', '>='],
  ['==', '=='],
  ['!=', '!='],
  ['<>', '!='],
])
const oneSign = new Map([
  ['+', '+'],
  ['-', '-'],
  ['−', '-'],
  ['–', '-'],
  ['*', '*'],
  ['·', '*'],
  ['⋅', '*'],
  ['×', '*'],
  ['∙', '*'],
  ['/', '/'],
  ['÷', '/'],
  ['∕', '/'],
  ['^', '^'],
  ['<', '<'],
  ['>', '>'],
  ['≤', '<='],
  ['≥', '>='],
  ['≠', '!='],
])
const comparisons = new Set(['<', '<=', '>', '>=', '==', '!='])

/** What ends the reading; caught where it began, never seen outside. */
class Unreadable extends Error {
  constructor(readonly problem: LooseProblem) {
    super(problem.message)
  }
}

class Reader {
  private at = 0
  private source = ''
  private readonly leaves: Leaf[] = []
  private readonly frames: Frame[] = [newFrame(-1)]
  private expectsOperand = true
  /** End of the piece read last, and what it was. */
  private end = 0
  private before: 'none' | 'operator' | 'number' | 'quantity' | 'symbol' | 'close' | 'open' | 'comma' = 'none'
  private operator = ''
  private operatorFrom = 0
  private raised = false
  private readonly isFunction: (name: string) => boolean
  readonly problems: LooseProblem[] = []

  constructor(
    private readonly text: string,
    private readonly vocabulary: Vocabulary,
    private readonly field: string,
  ) {
    this.isFunction = (name) => vocabulary.functions.has(name) || specialForms.has(name)
  }

  read(): Lexed | undefined {
    const { text } = this
    for (;;) {
      this.at = skipSpaces(text, this.at)
      if (this.at >= text.length) break
      const code = text.charCodeAt(this.at)
      if (isNameStart(code)) {
        const to = this.name()
        if (to) return this.finish(to)
      } else if (isDigit(code) || (code === 46 && isDigit(text.charCodeAt(this.at + 1)))) this.number()
      else if (code === 40) this.open()
      else if (code === 41) this.close()
      else if (code === 44) this.comma()
      else if (code === 63 || code === 58) this.condition(code === 63)
      else this.sign(code)
    }
    return this.finish()
  }

  private span(from: number, to: number): { field: string; from: number; to: number } {
    return { field: this.field, from, to }
  }

  private fail(problem: LooseProblem): never {
    throw new Unreadable(problem)
  }

  private frame(): Frame {
    return this.frames[this.frames.length - 1] as Frame
  }

  private leaf(leaf: Leaf, letter: string): void {
    if (this.leaves.length >= MOST_LEAVES) {
      this.fail(
        limitExceeded(
          `The expression has more than ${MOST_LEAVES} names and numbers. Split it into several formulas.`,
          this.span(leaf.range.from, leaf.range.to),
        ),
      )
    }
    this.source += letter
    this.leaves.push(leaf)
    this.at = leaf.range.to
    this.end = this.at
    this.expectsOperand = false
    this.raised = false
  }

  /** A value begins at `from` right after another: an implicit product, or something is missing. */
  private beforeOperand(from: number, kind: 'number' | 'name' | 'open'): void {
    if (this.expectsOperand) return
    const { text, end } = this
    if (kind === 'number') {
      const left = text.slice(0, end)
      this.fail(
        mendable(
          `An operator is missing between ${this.shownBefore()} and ${/^[\d.]+/.exec(text.slice(from))?.[0] ?? 'the number'}.`,
          text,
          this.span(end, from + 1),
          'Write * between them',
          `${left}*${text.slice(from)}`,
        ),
      )
    }
    const frame = this.frame()
    if (frame.slash !== undefined) frame.gaps.push({ from: end, to: from })
    this.source += '*'
  }

  private shownBefore(): string {
    const leaf = this.leaves.at(-1)
    return this.before === 'close' || leaf === undefined
      ? 'the bracket'
      : this.text.slice(leaf.range.from, leaf.range.to)
  }

  private number(): void {
    const { text, at, field } = this
    if (!this.expectsOperand && this.before === 'number') {
      const leaf = this.leaves.at(-1)
      const inverse = /^1\s*\/\s*/.exec(text.slice(at))
      const under = inverse && scanUnits(text, at + inverse[0].length)[0]
      if (leaf && under) {
        const written = `${under.name}^-${under.exponent}`
        this.fail(
          mendable(
            `${text.slice(at, under.to)} is no unit inside an expression. Write ${written}.`,
            text,
            this.span(at, under.to),
            `Write ${written}`,
            text.slice(0, at) + written + text.slice(under.to),
          ),
        )
      }
      if (leaf) this.fail(joinedNumber(text, leaf.range.from, leaf.range.to, at, field))
    }
    this.beforeOperand(at, 'number')
    const numeral = numeralAt(text, at, !this.raised)
    if (numeral.comma !== undefined) {
      this.problems.push(
        decimalComma(text, at, numeral.comma, numeral.to, this.frame().call !== undefined, field),
      )
    }
    if (!Number.isFinite(numeral.value))
      this.fail(numberTooLarge(text.slice(at, numeral.to), this.span(at, numeral.to)))
    const digits = text.slice(at, numeral.to)
    const quoted = this.quotedUnit(numeral.to)
    const phrase =
      quoted ??
      (this.raised
        ? undefined
        : phraseAfter(text, { from: at, to: numeral.to }, this.vocabulary, this.isFunction, field))
    this.checkPowerUnder(numeral, phrase?.to ?? numeral.to)
    if (phrase === undefined) {
      this.leaf(
        { type: 'number', value: numeral.value, text: digits, range: { from: at, to: numeral.to } },
        'v',
      )
      this.before = 'number'
      return
    }
    if (phrase.problem) this.problems.push(phrase.problem)
    this.leaf(
      {
        type: 'quantity',
        value: numeral.value,
        text: digits,
        unit: phrase.unit,
        range: { from: at, to: phrase.to },
      },
      'v',
    )
    this.before = 'quantity'
  }

  /** `E/2*10^3`: whether the power of ten is divided, too. */
  private checkPowerUnder({ times }: Numeral, to: number): void {
    if (times === undefined || this.operator !== '/' || this.before !== 'operator') return
    const { text, at } = this
    const apart = `${text.slice(at, times).trim()}*(${text.slice(skipSpaces(text, times + 1), to)})`
    this.problems.push(
      ambiguousDivision(
        `/${text.slice(at, to)}`,
        [`(${text.slice(at, to)})`, apart].map((reading) => ({
          shown: `/${reading}`,
          text: text.slice(0, at) + reading + text.slice(to),
        })),
        this.span(this.operatorFrom, to),
      ),
    )
  }

  /** `unit("N m")` at `at`: a unit that cannot be read as anything else. */
  private quotedUnit(at: number): ReturnType<typeof phraseAfter> {
    const start = skipSpaces(this.text, at)
    if (!this.text.startsWith('unit', start)) return undefined
    const match = /^unit\s*\(\s*(["“”])([^"“”]*)["“”]\s*\)/.exec(this.text.slice(start, start + 200))
    if (!match) return undefined
    const from = start + match[0].indexOf(match[1] ?? '"') + 1
    const reading = readUnit(match[2] ?? '', this.field)
    const to = start + match[0].length
    if (reading.phrase) return { unit: reading.phrase, to }
    return {
      unit: { text: match[2] ?? '', factors: [] },
      to,
      problem: { code: reading.problem.code, message: reading.problem.message, span: this.span(from, to) },
    }
  }

  /** A name; true answers that a `to` begins here, with the place after it. */
  private name(): number | undefined {
    const { text, at } = this
    let to = at
    for (let parts = 1; ; parts++) {
      while (isNamePart(text.charCodeAt(to)) || isPrime(text.charCodeAt(to))) to++
      const next = text.charCodeAt(to + 1)
      if (text[to] !== '.' || !(isNameStart(next) || isDigit(next))) break
      if (parts === 4)
        this.fail(
          syntax(
            `${text.slice(at, to)}… has too many points. A reference has at most three.`,
            this.span(at, to + 1),
          ),
        )
      to++
    }
    const typed = text.slice(at, to)
    if (typed === 'to' || typed === 'and' || typed === 'or' || typed === 'not')
      return this.word(typed, at, to)
    const name = canonicalName(typed)
    const bracket = skipSpaces(text, to)
    const isCalled = text[bracket] === '('
    if (name === 'unit' && isCalled) {
      const quoted = this.quotedUnit(at)
      if (!quoted)
        this.fail(
          syntax('unit takes a unit between quotation marks: unit("N m").', this.span(at, bracket + 1)),
        )
      this.beforeOperand(at, 'name')
      if (quoted.problem) this.problems.push(quoted.problem)
      this.leaf(
        { type: 'quantity', value: 1, text: '1', unit: quoted.unit, range: { from: at, to: quoted.to } },
        'v',
      )
      this.before = 'quantity'
      return undefined
    }
    const signature = isCalled ? signatureOf(name, this.vocabulary) : undefined
    if (isCalled && signature === undefined && isUnavailable(name)) {
      this.fail(syntax(`${name} is not available in an expression.`, this.span(at, to)))
    }
    this.beforeOperand(at, 'name')
    if (signature === undefined) {
      if (this.isFunction(name))
        this.fail(
          syntax(
            `${name} is a function: its arguments stand in brackets after it, ${name}(…).`,
            this.span(at, to),
          ),
        )
      this.leaf({ type: 'symbol', name, range: { from: at, to } }, 'v')
      this.before = 'symbol'
      return undefined
    }
    this.leaf({ type: 'function', name, range: { from: at, to } }, 'f')
    this.at = bracket
    const last = signature.parameters.at(-1)?.kind
    const kinds = signature.parameters.map((parameter) => parameter.kind)
    this.push({ name, kinds: signature.variadic === true ? [...kinds, last] : kinds, argument: 0 })
    this.bareArgument()
    return undefined
  }

  private word(typed: 'to' | 'and' | 'or' | 'not', at: number, to: number): number | undefined {
    const { text } = this
    if (typed === 'not') {
      if (!this.expectsOperand)
        this.fail(syntax('not stands before a condition, after and, or, or a bracket.', this.span(at, to)))
      this.source += ' not '
      this.at = to
      return undefined
    }
    if (this.expectsOperand) this.missingOperand(at, typed)
    if (typed !== 'to') {
      this.binary(typed, at, to)
      return undefined
    }
    if (this.frames.length > 1) {
      const closing = ')'.repeat(this.frames.length - 1)
      this.fail(
        mendable(
          'A closing bracket is missing before to. to stands at the end and fixes the display unit.',
          text,
          this.span(this.frame().open, at),
          `Write ${closing} before to`,
          `${text.slice(0, this.end)}${closing} ${text.slice(at)}`,
        ),
      )
    }
    return to
  }

  /** A unit or a bare word where the function takes one. */
  private bareArgument(): void {
    const frame = this.frame()
    const kind = frame.call?.kinds[frame.call.argument]
    if (kind === undefined || kind === 'value') return
    const { text } = this
    const from = skipSpaces(text, this.at)
    let to = from
    while (to < text.length && text[to] !== ',' && text[to] !== ')') to++
    while (to > from && isSpace(text.charCodeAt(to - 1))) to--
    const typed = text.slice(from, to)
    if (kind === 'unit') {
      const quoted = this.quotedUnit(from)
      if (quoted) {
        if (quoted.problem) this.problems.push(quoted.problem)
        this.leaf({ type: 'unit', unit: quoted.unit, range: { from, to: quoted.to } }, 'v')
        this.before = 'symbol'
        return
      }
      const reading = readUnit(typed, this.field)
      if (typed === '' || reading.problem) {
        const message =
          reading.problem && typed !== ''
            ? reading.problem.message
            : `${frame.call?.name} takes a unit here, such as MPa.`
        this.fail({
          code: reading.problem?.code ?? 'syntax',
          message,
          span: this.span(from, Math.max(to, from + 1)),
        })
      }
      this.leaf({ type: 'unit', unit: reading.phrase, range: { from, to } }, 'v')
    } else {
      if (!/^[A-Za-z0-9][A-Za-z0-9_+./-]*$/.test(typed)) {
        this.fail(
          syntax(
            `${frame.call?.name} takes a bare word here, such as ${kind === 'fit' ? 'k6' : 'R40'}.`,
            this.span(from, Math.max(to, from + 1)),
          ),
        )
      }
      this.leaf({ type: 'word', text: typed, range: { from, to } }, 'v')
    }
    this.before = 'symbol'
  }

  private push(call?: Frame['call']): void {
    if (this.frames.length > DEEPEST) {
      this.fail(
        limitExceeded(
          `Brackets stand more than ${DEEPEST} deep. Split the expression into several formulas.`,
          this.span(this.at, this.at + 1),
        ),
      )
    }
    this.frames.push(newFrame(this.at, call))
    this.source += '('
    this.at++
    this.end = this.at
    this.before = 'open'
    this.expectsOperand = true
    this.raised = false
  }

  private open(): void {
    this.beforeOperand(this.at, 'open')
    this.push()
  }

  private close(): void {
    const { text, at } = this
    if (this.frames.length === 1) {
      this.fail(
        mendable(
          'A closing bracket has no opening one.',
          text,
          this.span(at, at + 1),
          'Remove the bracket',
          text.slice(0, at) + text.slice(at + 1),
        ),
      )
    }
    const frame = this.frame()
    if (this.expectsOperand && !(this.before === 'open' && frame.call !== undefined))
      this.missingOperand(at, ')')
    this.leaveFrame(frame)
    this.frames.pop()
    this.source += ')'
    this.at = at + 1
    this.end = this.at
    this.before = 'close'
    this.expectsOperand = false
    this.raised = false
  }

  private leaveFrame(frame: Frame): void {
    this.settleDivision(frame)
    if (frame.questions > 0)
      this.fail(
        syntax(
          'A condition has ? without its :. Write test ? value : other value.',
          this.span(Math.max(frame.open, 0), this.end),
        ),
      )
  }

  private comma(): void {
    const { at } = this
    const frame = this.frame()
    if (frame.call === undefined) {
      this.fail(
        syntax(
          'A comma stands only between the arguments of a function. The decimal mark is the point.',
          this.span(at, at + 1),
        ),
      )
    }
    if (this.expectsOperand) this.missingOperand(at, ',')
    this.leaveFrame(frame)
    frame.compared = false
    frame.call.argument++
    this.source += ','
    this.at = at + 1
    this.end = this.at
    this.before = 'comma'
    this.expectsOperand = true
    this.bareArgument()
  }

  private condition(asks: boolean): void {
    const { at } = this
    const frame = this.frame()
    if (this.expectsOperand) this.missingOperand(at, asks ? '?' : ':')
    if (!asks && frame.questions === 0)
      this.fail(syntax(': has no ? before it. Write test ? value : other value.', this.span(at, at + 1)))
    this.settleDivision(frame)
    frame.questions += asks ? 1 : -1
    if (this.frames.length + frame.questions > DEEPEST) {
      this.fail(
        limitExceeded(
          `Conditions stand more than ${DEEPEST} deep. Split the expression into several formulas.`,
          this.span(at, at + 1),
        ),
      )
    }
    this.binary(asks ? '?' : ':', at, at + 1)
  }

  private missingOperand(at: number, next: string): never {
    const after = this.before === 'operator' ? ` after ${this.text.slice(this.operatorFrom, this.end)}` : ''
    const before = next === '' ? '' : ` before ${next}`
    if (this.before === 'open' && next === ')')
      this.fail(syntax('The brackets are empty.', this.span(at - 1, at + 1)))
    this.fail(
      syntax(
        `A value is missing${after || before || ' here'}.`,
        this.span(after ? this.operatorFrom : at, after ? this.end : at + Math.max(next.length, 1)),
      ),
    )
  }

  private binary(operator: string, from: number, to: number): void {
    const frame = this.frame()
    if (operator === 'and' || operator === 'or' || operator === '?' || operator === ':')
      frame.compared = false
    if (comparisons.has(operator)) {
      if (frame.compared)
        this.fail(syntax('Two values are compared at a time. Write a < b and b < c.', this.span(from, to)))
      frame.compared = true
    }
    if (operator !== '^') {
      this.settleDivision(frame)
      if (operator === '/') frame.slash = to
    }
    this.source += operator === 'and' || operator === 'or' ? ` ${operator} ` : operator
    this.operator = operator
    this.operatorFrom = from
    this.raised = operator === '^'
    this.before = 'operator'
    this.expectsOperand = true
    this.at = to
    this.end = to
  }

  /** An implicit product within a divisor: both readings. */
  private settleDivision(frame: Frame): void {
    const { slash, gaps } = frame
    frame.slash = undefined
    if (slash === undefined || gaps.length === 0) return
    frame.gaps = []
    const { text, end } = this
    const from = skipSpaces(text, slash)
    const divisor = text.slice(from, end)
    let apart = text.slice(from, gaps[0]?.from)
    for (const [place, gap] of gaps.entries()) apart += `*${text.slice(gap.to, gaps[place + 1]?.from ?? end)}`
    const whole = (reading: string): string => text.slice(0, from) + reading + text.slice(end)
    this.problems.push(
      ambiguousDivision(
        `/${divisor}`,
        [`(${divisor})`, apart].map((reading) => ({ shown: `/${reading}`, text: whole(reading) })),
        this.span(slash - 1, end),
      ),
    )
  }

  private sign(code: number): void {
    const { text, at } = this
    const raised = superscriptDigit(code) >= 0 || text[at] === '⁻' || text[at] === 'ⁿ'
    if (raised) return this.superscript()
    const two = twoSigns.get(text.slice(at, at + 2))
    const operator = two ?? oneSign.get(text[at] ?? '')
    if (operator === undefined) {
      if (text[at] === '%' || text[at] === '°') {
        const shown = text[at]
        this.fail(syntax(`${shown} is a unit and stands after a number: 5 ${shown}.`, this.span(at, at + 1)))
      }
      this.fail(strayCharacter(text, at, this.field))
    }
    const to = at + (two === undefined ? 1 : 2)
    if (operator === '*' && text[to] === '*') {
      this.fail(
        mendable(
          'A power is written with ^.',
          text,
          this.span(at, to + 1),
          'Write ^',
          `${text.slice(0, at)}^${text.slice(to + 1)}`,
        ),
      )
    }
    if (!this.expectsOperand) return this.binary(operator, at, to)
    if (operator !== '-' && operator !== '+') this.missingOperand(at, text.slice(at, to))
    this.source += operator
    this.at = to
    this.end = to
    if (this.before !== 'operator') this.before = 'operator'
    this.operator = `sign ${operator}`
    this.operatorFrom = at
  }

  /** `x²`, `10⁻³`, `xⁿ`: an exponent written above the line. */
  private superscript(): void {
    const { text, at } = this
    if (this.expectsOperand) this.missingOperand(at, text[at] ?? '')
    if (text[at] === 'ⁿ') {
      this.source += '^'
      this.leaf({ type: 'symbol', name: 'n', range: { from: at, to: at + 1 } }, 'v')
      this.before = 'symbol'
      return
    }
    const negative = text[at] === '⁻'
    let to = negative ? at + 1 : at
    let size = 0
    let digits = ''
    for (
      let digit = superscriptDigit(text.charCodeAt(to));
      digit >= 0;
      digit = superscriptDigit(text.charCodeAt(to))
    ) {
      size = size * 10 + digit
      digits += String(digit)
      to++
    }
    if (digits === '')
      this.fail(syntax('A raised minus needs raised digits after it: x⁻¹.', this.span(at, at + 1)))
    this.source += '^'
    this.leaf(
      {
        type: 'number',
        value: negative ? -size : size,
        text: (negative ? '-' : '') + digits,
        range: { from: at, to },
      },
      'v',
    )
    this.before = 'symbol'
  }

  private finish(to?: number): Lexed {
    const { text, field } = this
    if (this.expectsOperand) {
      if (this.before === 'none') this.fail(syntax('The expression is empty.', { field }))
      this.missingOperand(Math.max(this.end - 1, 0), '')
    }
    if (this.frames.length > 1) {
      const missing = this.frames.length - 1
      const closing = ')'.repeat(missing)
      this.fail(
        mendable(
          missing === 1 ? 'A closing bracket is missing.' : `${missing} closing brackets are missing.`,
          text,
          this.span(this.frame().open, this.end),
          `Write ${closing} at the end`,
          text.slice(0, this.end) + closing,
        ),
      )
    }
    this.leaveFrame(this.frame())
    if (to === undefined) return { source: this.source, leaves: this.leaves }
    const asked = text.slice(to)
    const start = skipSpaces(text, to)
    if (start >= text.length) this.fail(syntax('A unit is missing after to.', this.span(to - 2, to)))
    const reading = readUnit(asked.trim(), field)
    if (reading.problem) {
      this.fail(shifted(reading.problem, text, start))
    }
    return { source: this.source, leaves: this.leaves, to: reading.phrase }
  }
}

/** A problem of a unit that stands at `start` of `text`, as a problem of the whole text. */
const shifted = (problem: LooseProblem, text: string, start: number): LooseProblem => ({
  ...problem,
  ...(problem.span === undefined
    ? {}
    : {
        span: {
          field: problem.span.field,
          from: (problem.span.from ?? 0) + start,
          to: (problem.span.to ?? text.length - start) + start,
        },
      }),
  ...(problem.repairs === undefined
    ? {}
    : {
        repairs: problem.repairs.map(({ label, fields }) => ({
          label,
          fields: Object.fromEntries(
            Object.entries(fields).map(([field, unit]) => [field, text.slice(0, start) + unit]),
          ),
        })),
      }),
})

/** Reads `text`; `lexed` is absent where it cannot be read. */
export const lex = (
  text: string,
  vocabulary: Vocabulary,
  field: string,
): { lexed?: Lexed; problems: LooseProblem[] } => {
  if (text.length > LONGEST_EXPRESSION) {
    return {
      problems: [
        limitExceeded(
          `The expression has ${text.length} characters; ${LONGEST_EXPRESSION} is the most. Split it into several formulas.`,
          { field },
        ),
      ],
    }
  }
  const reader = new Reader(text, vocabulary, field)
  try {
    const lexed = reader.read()
    return { problems: reader.problems, ...(lexed === undefined ? {} : { lexed }) }
  } catch (thrown) {
    if (!(thrown instanceof Unreadable)) throw thrown
    return { problems: [...reader.problems, thrown.problem] }
  }
}
