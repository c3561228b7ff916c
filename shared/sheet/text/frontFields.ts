import { z } from 'zod'
import type { Problem } from '../../errors/problem'
import { frontSchema, sourceSchema } from '../sheet'
import type { Front } from '../sheet'
import type { Heading } from './heading'

const headingSchemas = {
  title: z.string().max(400),
  number: z.string().max(100),
  template: z.object({ name: z.string().max(400), edition: z.string().max(400) }).strict(),
}

const isMapping = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

const describe = (issue: z.core.$ZodIssue | undefined): string => (issue ? `: ${issue.message}` : '')

export interface FrontFields {
  heading: Heading
  front: Front
  version: unknown
  isMapping: boolean
  problems: Problem[]
}

/** Takes front matter apart field by field: one that cannot be read is a problem and keeps its default. */
export const readFrontFields = (
  value: unknown,
  problem: (message: string, key: string) => Problem,
): FrontFields => {
  const problems: Problem[] = []
  const heading: Heading = { title: '' }
  const authored: Record<string, unknown> = {}
  const sources: Record<string, unknown> = {}
  const fields = isMapping(value) ? value : {}
  if (value !== undefined && value !== null && !isMapping(value)) {
    problems.push(problem('The front matter must be a list of “name: value”.', ''))
  }
  const take = (schema: z.ZodType, key: string, text: unknown, put: (read: unknown) => void) => {
    const read = schema.safeParse(text)
    if (read.success) put(read.data)
    else
      problems.push(
        problem(`“${key}” could not be read${describe(read.error.issues[0])}. Write it again.`, key),
      )
  }
  for (const [key, text] of Object.entries(fields)) {
    if (key === 'torfolio') continue
    if (key === 'sources') {
      if (!isMapping(text)) problems.push(problem('“sources” must be a list of “key: {title: …}”.', key))
      for (const [name, source] of Object.entries(isMapping(text) ? text : {})) {
        const named = typeof source === 'string' ? { title: source } : source
        const schema = z.preprocess((read) => read, sourceSchema.strict())
        take(schema, `sources.${name}`, named, (read) =>
          take(frontSchema.shape.sources, `sources.${name}`, { [name]: read }, () =>
            Object.defineProperty(sources, name, {
              value: read,
              enumerable: true,
              writable: true,
              configurable: true,
            }),
          ),
        )
      }
    } else if (key in headingSchemas) {
      const name = key as keyof typeof headingSchemas
      take(headingSchemas[name], key, text, (read) => Object.assign(heading, { [name]: read }))
    } else if (Object.hasOwn(frontSchema.shape, key)) {
      take(frontSchema.shape[key as keyof Front], key, text, (read) => (authored[key] = read))
    } else {
      problems.push(
        problem(`The front matter has no field “${key}”. Values of a sheet stand in its lines.`, key),
      )
    }
  }
  return {
    heading,
    front: frontSchema.parse({ ...authored, sources }),
    version: fields.torfolio,
    isMapping: isMapping(value),
    problems,
  }
}
