/** A figure of an analysis for print: the same primitives as on the screen, symbols drawn as mathematics. */
import type { Analysis, AnalysisResult, Figure, FigureFrame } from '@shared/engine/contracts'
import type { PrintedFigure, PrintedTable } from '../pages'
import { cell, math, quantityIn, quantityText, symbolNode, type UnitSystem } from './shown'

/** CSS pixels of the text column, and of text and source column together, at 0.75 pt each. */
const COLUMN = 408
const WIDE = 556

export const figureOf = (analysis: Analysis, result: AnalysisResult, system: UnitSystem): Figure => {
  const frame: FigureFrame = {
    width: analysis.spec.along ? WIDE : COLUMN,
    show: (si, dimension, unit) => quantityText(quantityIn(si, { dimension, unit }, system)),
  }
  return analysis.figure(result, frame)
}

/** A coordinate that is no number would stop the whole document. */
const isFinite = (value: unknown): boolean => {
  if (typeof value === 'number') return Number.isFinite(value)
  return typeof value !== 'object' || value === null || Object.values(value).every(isFinite)
}

export const printedFigure = ({ width, height, description, elements }: Figure): PrintedFigure => ({
  width,
  height,
  description,
  isWide: width > COLUMN,
  elements: elements
    .filter(isFinite)
    .map((element) =>
      element.draw === 'symbol' ? { ...element, symbol: symbolNode(element.symbol) } : element,
    ),
})

const isSymbol = /^[A-Za-z]\w*$/

/** Values behind the curves; rows that repeat the row before (both sides of a station without a jump) are left out. */
export const alongTable = ({ table, reading }: Figure): PrintedTable | undefined => {
  if (!table || !reading) return undefined
  const rows = table.rows.filter((row, index) => row.join('|') !== table.rows[index - 1]?.join('|'))
  return {
    head: table.head.map((name) => (isSymbol.test(name) ? [math(symbolNode(name))] : cell(name))),
    parts: table.head.map(() => 1),
    rows: rows.map((row) => row.map(cell)),
  }
}
