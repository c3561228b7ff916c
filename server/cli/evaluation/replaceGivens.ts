/** Other values for some givens, in their own units, so that tolerance and range keep their meaning. */
import { inWords } from '@shared/engine/dimensions/words'
import { sameDimension } from '@shared/engine/dimensions/dimension'
import { readCompact } from '@shared/engine/parse/shorthand'
import { canonicalName } from '@shared/engine/parse/symbolName'
import { nearestNames } from '@shared/engine/parse/nearest'
import { dimensionOfUnit, fromSI, readUnit, toSI } from '@shared/engine/units/unit'
import { readAuthoredNumber } from '@shared/engine/parse/authoredNumber'
import type { Problem } from '@shared/errors/problem'
import type { Given } from '@shared/sheet/kinds'
import type { Sheet } from '@shared/sheet/sheet'

const refused = (code: Problem['code'], message: string): Problem => ({ code, severity: 'error', message })

export const replaceGivens = (
  sheet: Sheet,
  givens: readonly { symbol: string; text: string }[],
): { sheet: Sheet; problems: Problem[] } => {
  const problems: Problem[] = []
  const values = new Map<string, string>()
  const symbols = sheet.blocks.flatMap((block) =>
    block.type === 'line' && block.line.kind === 'given' ? [canonicalName(block.line.symbol.trim())] : [],
  )
  for (const { symbol, text } of givens) {
    const name = canonicalName(symbol)
    if (symbols.includes(name)) values.set(name, text)
    else problems.push(unknownGiven(symbol, nearestNames(name, symbols)))
  }
  const blocks = sheet.blocks.map((block) => {
    if (block.type !== 'line' || block.line.kind !== 'given') return block
    const text = values.get(canonicalName(block.line.symbol.trim()))
    if (text === undefined) return block
    const { line, problem } = withValue(block.line, text)
    if (problem) problems.push(problem)
    return { ...block, line }
  })
  return { sheet: { ...sheet, blocks }, problems }
}

const unknownGiven = (symbol: string, near: string[]): Problem =>
  refused(
    'unknown-symbol',
    `The sheet has no given ${symbol}.${near.length > 0 ? ` Did you mean ${near.join(' or ')}?` : ''}`,
  )

const withValue = (line: Given, text: string): { line: Given; problem?: Problem } => {
  const reading = readCompact(`${line.symbol} = ${text}`, { isDefined: () => false, block: 'given' })
  if (reading.reading !== 'line' || reading.line.kind !== 'given') {
    return {
      line,
      problem: refused('syntax', `--given ${line.symbol}=${text}: this is no number with a unit.`),
    }
  }
  const { value, unit } = reading.line
  if (unit.trim() === line.unit.trim()) return { line: { ...line, value } }
  const [from, to] = [readUnit(unit).phrase, readUnit(line.unit).phrase]
  const number = readAuthoredNumber(value).value
  if (!from || !to || number === undefined) {
    return {
      line,
      problem: refused('unknown-unit', `--given ${line.symbol}=${text}: ${unit} is no known unit.`),
    }
  }
  if (!sameDimension(dimensionOfUnit(from), dimensionOfUnit(to)))
    return { line, problem: otherDimension(line, text, unit) }
  return { line: { ...line, value: withoutNoise(fromSI(toSI(number, from), to)) } }
}

/** 5.2 cm is 52 mm, not 52.00000000000001 mm: conversion adds no digits beyond the fifteenth. */
const withoutNoise = (number: number): string => String(Number(number.toPrecision(15)))

const otherDimension = (line: Given, text: string, unit: string): Problem => {
  const wanted = line.unit.trim()
  if (unit.trim() === '') {
    return refused(
      'unit-mismatch',
      `--given ${line.symbol}=${text} has no unit: ${line.symbol} is in ${wanted}.`,
    )
  }
  const phrase = readUnit(wanted).phrase
  const kind = phrase ? inWords(dimensionOfUnit(phrase)) : wanted
  return refused(
    'unit-mismatch',
    `--given ${line.symbol}=${text}: ${line.symbol} is ${kind}, in ${wanted || 'no unit'}.`,
  )
}
