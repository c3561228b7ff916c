/** A formula: symbol = expression. */
import type { EngineLine } from '../../contracts'
import { readUnit } from '../../units/unit'
import {
  checkExpression,
  isError,
  readExpression,
  referencesOf,
  quantityOrProblem,
  type ExpressionReading,
} from '../expressionReading'
import { missingText, twoUnits } from '../problems'
import type { Checked, CheckScope, ReadScope, Reading } from '../stages'

type FormulaLine = Extract<EngineLine, { kind: 'formula' }>

export const readFormula = (line: FormulaLine, { vocabulary }: ReadScope): Reading => {
  const isEmpty = line.expression.trim() === ''
  const expression: ExpressionReading = isEmpty
    ? {
        field: 'expression',
        text: '',
        problems: [missingText('expression', 'This formula has no right side yet.')],
      }
    : readExpression(line.expression, 'expression', vocabulary)
  const unit = line.unit.trim() === '' ? undefined : readUnit(line.unit, 'unit')
  const asked = expression.parsed?.to
  const problems = [...expression.problems]
  if (unit?.problem) problems.push(unit.problem)
  if (asked && unit?.phrase && asked.text !== unit.phrase.text)
    problems.push(twoUnits(asked.text, unit.phrase.text))

  const check = (scope: CheckScope): Checked => {
    const checked = checkExpression(expression, scope, unit?.phrase)
    const { type } = checked
    if (!type || problems.some(isError)) return { problems: checked.problems, empirical: checked.empirical }
    const digits = line.digits ?? scope.settings.digits
    return {
      problems: checked.problems,
      empirical: checked.empirical,
      publication: { type: 'quantity', quantity: { dimension: type.dimension, unit: type.unit } },
      evaluate: () => {
        const { result, problem } = quantityOrProblem('expression', checked, digits)
        if (!result) return { problems: problem ? [problem] : [] }
        return { problems: [], value: result, numbers: { '': result.si } }
      },
    }
  }
  const { reads, along, whole, where, expressions } = referencesOf([expression])
  return { reads, along, whole, where, expressions, problems, check }
}
