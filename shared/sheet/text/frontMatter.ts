import type { Problem } from '../../errors/problem'
import { FORMAT_VERSION, frontSchema } from '../sheet'
import type { Front } from '../sheet'
import { readFrontFields } from './frontFields'
import type { Heading } from './heading'
import { readYaml, writeYaml } from './yaml'

export interface FrontReading {
  heading: Heading
  front: Front
  problems: Problem[]
  /** The text after the front matter, and its first line's zero-based number. */
  body: string
  bodyLine: number
  /** False where a newer program wrote the text: it must not be read by this one. */
  readable: boolean
}

const error = (message: string, line: number): Problem => ({
  code: 'invalid-field',
  severity: 'error',
  message,
  textLine: line + 1,
})

const versionProblem = (version: unknown, line: number): Problem | undefined => {
  if (version === undefined) {
    return {
      ...error('The front matter does not say “torfolio: 1”; it was read as that.', line),
      severity: 'advisory',
    }
  }
  if (typeof version === 'string' && /^\d{1,6}$/.test(version) && Number(version) >= 1) {
    if (Number(version) <= FORMAT_VERSION) return undefined
    return error(
      `This text has the format ${version}; this program reads ${FORMAT_VERSION}. Open it with a newer one.`,
      line,
    )
  }
  return error('“torfolio” must be the number of the format: torfolio: 1.', line)
}

/** Splits off the front matter and reads it; a text without any has an empty front. */
export const readFrontMatter = (text: string): FrontReading => {
  const empty = {
    heading: { title: '' },
    front: frontSchema.parse({}),
    problems: [],
    body: text,
    bodyLine: 0,
    readable: true,
  }
  const opening = /^---[ \t]*\n/.exec(text)
  if (!opening) return empty
  const closing = /^(?:---|\.\.\.)[ \t]*$/m.exec(text.slice(opening[0].length))
  if (!closing)
    return {
      ...empty,
      problems: [error('The front matter is not closed: a line of three hyphens ends it.', 0)],
    }
  const yaml = text.slice(opening[0].length, opening[0].length + closing.index)
  const bodyLine = yaml.split('\n').length
  const body = text.slice(opening[0].length + closing.index + closing[0].length).replace(/^\n/, '')
  const { value, lineOf, problems } = readYaml(yaml)
  const at = (key: string) => lineOf(key) + 1
  const read = readFrontFields(value, (message, key) => error(message, at(key)))
  const found = [...problems.map(({ message, line }) => error(message, line + 1)), ...read.problems]
  if (problems.length === 0 && read.isMapping) {
    const version = versionProblem(read.version, at('torfolio'))
    if (version) found.push(version)
  }
  const readable = !(Number(read.version) > FORMAT_VERSION)
  return { heading: read.heading, front: read.front, problems: found, body, bodyLine: bodyLine + 1, readable }
}

export const writeFrontMatter = (front: Front, heading: Heading): string => {
  const { purpose, method, conclusion, unitSystem, language, sources } = front
  const fields = {
    torfolio: String(FORMAT_VERSION),
    title: heading.title,
    ...(heading.number === undefined ? {} : { number: heading.number }),
    ...(heading.template === undefined ? {} : { template: heading.template }),
    unitSystem,
    language,
    purpose,
    method,
    conclusion,
    ...(Object.keys(sources).length > 0 ? { sources } : {}),
  }
  return `---\n${writeYaml(fields)}---\n`
}
