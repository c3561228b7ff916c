import { importText } from '@shared/sheet/text'
import type { LoadedTemplate } from './library'

/** Reads one template file. @throws Error naming what is wrong with it and where */
export const readTemplate = (name: string, text: string): LoadedTemplate => {
  const { sheet, heading, problems } = importText(text)
  const error = problems.find((problem) => problem.severity === 'error')
  if (sheet === undefined || error !== undefined)
    throw new Error(
      `templates/${name}.md, line ${error?.textLine ?? 1}: ${error?.message ?? 'it cannot be read'}`,
    )
  return { name, title: heading.title || name, edition: heading.template?.edition ?? '1', sheet }
}
