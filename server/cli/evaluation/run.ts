/** The evaluate command without its process: words in, text and exit code out. */
import { readFile } from 'node:fs/promises'
import type { Problem } from '@shared/errors/problem'
import { evaluateSheet } from '@shared/pipeline'
import { importText, longestText } from '@shared/sheet/text'
import { readArguments, usage } from './arguments'
import { printed } from './printed'
import { replaceGivens } from './replaceGivens'
import { exitCodeOf, reportOf, type Report } from './report'

export interface Outcome {
  exitCode: 0 | 1 | 2
  out: string
  /** For standard error. */
  complaint: string
}

export const runEvaluate = async (words: readonly string[]): Promise<Outcome> => {
  const reading = readArguments(words)
  if (reading.message !== undefined) return failed(reading.json, `${reading.message}\nUse: ${usage}`)
  const { file, givens, json } = reading.arguments
  const { text, message } = await readText(file)
  if (text === undefined) return failed(json, message)

  const { sheet: written, heading, problems: textProblems, textLines } = importText(text)
  if (!written) return failedWith(json, textProblems)
  const { sheet, problems } = replaceGivens(written, givens)
  if (problems.length > 0) return failedWith(json, problems)
  const { lines } = evaluateSheet(sheet)
  const report = reportOf(sheet, lines, textProblems, textLines ?? new Map())
  const out = json ? `${JSON.stringify(report, null, 2)}\n` : printed(heading.title, sheet, lines, report)
  return { exitCode: exitCodeOf(report), out, complaint: '' }
}

const readText = async (file: string): Promise<{ text?: string; message: string }> => {
  let bytes: Buffer
  try {
    bytes = await readFile(file)
  } catch (error) {
    return { message: `${file} cannot be read: ${reasonOf(error)}.` }
  }
  if (bytes.length > 4 * longestText) return { message: `${file} is too large for a sheet.` }
  try {
    return { text: new TextDecoder('utf-8', { fatal: true }).decode(bytes), message: '' }
  } catch {
    return { message: `${file} is not UTF-8 text.` }
  }
}

const reasons: Record<string, string> = {
  ENOENT: 'there is no such file',
  EISDIR: 'it is a folder',
  EACCES: 'reading is not permitted',
}

const reasonOf = (error: unknown): string => {
  const code: unknown = error instanceof Error ? Reflect.get(error, 'code') : undefined
  return (
    (typeof code === 'string' && reasons[code]) || (error instanceof Error ? error.message : String(error))
  )
}

const failed = (json: boolean, message: string): Outcome =>
  failedWith(json, [{ code: 'invalid-field', severity: 'error', message }])

const failedWith = (json: boolean, problems: Problem[]): Outcome => {
  const report: Report = { values: {}, criteria: [], lines: {}, problems }
  const complaint = problems
    .map(({ message, textLine }) => `${textLine === undefined ? '' : `line ${textLine}: `}${message}`)
    .join('\n')
  return { exitCode: 1, out: json ? `${JSON.stringify(report, null, 2)}\n` : '', complaint: `${complaint}\n` }
}
