/** From text to tree: the lexer, then the grammar, then what only the tree can tell. */
import type { LooseProblem } from '../../errors/problem'
import { limitExceeded, severityOf, syntax } from '../problems'
import type { Expression, ParsedExpression } from './expression'
import { treeOf } from './grammar'
import { lex } from './lex'
import { isCaseMember, signatureOf } from './specialForms'
import type { Vocabulary } from './vocabulary'

export type { Vocabulary } from './vocabulary'

export interface ParseResult {
  /** Absent where a problem stands in the way. */
  parsed?: ParsedExpression
  problems: LooseProblem[]
}

const counted = (least: number, most: number): string => {
  const words = (number: number): string => (number === 1 ? '1 argument' : `${number} arguments`)
  if (most === Infinity) return `at least ${words(least)}`
  return least === most ? words(least) : `${least} to ${words(most)}`
}

/** Walks the tree once: what it reads, and calls with too few or too many arguments. */
const survey = (
  root: Expression,
  vocabulary: Vocabulary,
  field: string,
): { reads: string[]; problems: LooseProblem[] } => {
  const reads = new Set<string>()
  const problems: LooseProblem[] = []
  const visit = (node: Expression): void => {
    switch (node.type) {
      case 'symbol':
        if (node.name !== 'pi') reads.add(node.name)
        return
      case 'unary':
        return visit(node.operand)
      case 'binary':
        visit(node.left)
        return visit(node.right)
      case 'group':
        return visit(node.inner)
      case 'conditional':
        visit(node.test)
        visit(node.then)
        return visit(node.otherwise)
      case 'call': {
        if (isCaseMember(node.name)) reads.add(node.name.slice(0, node.name.indexOf('.')))
        const signature = signatureOf(node.name, vocabulary)
        const least = signature?.parameters.filter((parameter) => parameter.optional !== true).length ?? 0
        const most = signature?.variadic === true ? Infinity : (signature?.parameters.length ?? 0)
        const given = node.arguments.length
        if (given < least || given > most) {
          const names = signature?.parameters.map((parameter) => parameter.name).join(', ') ?? ''
          const span = { field, from: node.range.from, to: node.range.to }
          problems.push(syntax(`${node.name} takes ${counted(least, most)} (${names}), not ${given}.`, span))
        }
        if (!isCaseMember(node.name)) node.arguments.forEach(visit)
        return
      }
      default:
    }
  }
  visit(root)
  return { reads: [...reads], problems }
}

/**
 * Reads an expression. Spans and repairs name `field` (`expression` unless told otherwise). Never throws for what
 * a person wrote.
 */
export const parseExpression = (text: string, vocabulary: Vocabulary, field = 'expression'): ParseResult => {
  const { lexed, problems } = lex(text, vocabulary, field)
  if (lexed === undefined || problems.some((problem) => severityOf(problem) === 'error')) return { problems }
  let root: Expression
  try {
    root = treeOf(text, lexed)
  } catch (thrown) {
    const tooDeep = thrown instanceof RangeError
    const problem = tooDeep
      ? limitExceeded('The expression is nested too deeply. Split it into several formulas.', { field })
      : syntax('This cannot be read as an expression.', { field })
    return { problems: [...problems, problem] }
  }
  const { reads, problems: found } = survey(root, vocabulary, field)
  if (found.length > 0) return { problems: [...problems, ...found] }
  return { parsed: { text, root, reads, ...(lexed.to === undefined ? {} : { to: lexed.to }) }, problems }
}
