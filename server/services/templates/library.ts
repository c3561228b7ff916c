/** The template library: files in text form, read once when the server starts. */
import { readFile, readdir } from 'node:fs/promises'
import { basename, join } from 'node:path'
import type { Sheet } from '@shared/sheet/sheet'

export interface LoadedTemplate {
  /** File name without `.md`. */
  name: string
  title: string
  edition: string
  sheet: Sheet
}

export interface TemplateLibrary {
  /** By title. */
  all: readonly LoadedTemplate[]
  find(name: string): LoadedTemplate | undefined
}

/** Reads one text form. @throws Error naming the file and what is wrong with it */
export type ReadTemplate = (name: string, text: string) => LoadedTemplate

/**
 * @param folder where the `.md` files are; without one the library is empty
 * @param failed hears of a file that cannot be read: it is left out, the others stay
 */
export const loadTemplates = async (
  folder: string,
  read: ReadTemplate,
  failed: (error: unknown) => void,
): Promise<TemplateLibrary> => {
  const files = await readdir(folder).catch(() => [])
  const all: LoadedTemplate[] = []
  for (const file of files.filter((name) => name.endsWith('.md'))) {
    try {
      all.push(read(basename(file, '.md'), await readFile(join(folder, file), 'utf8')))
    } catch (error) {
      failed(error)
    }
  }
  all.sort((left, right) => left.title.localeCompare(right.title))
  return { all, find: (name) => all.find((template) => template.name === name) }
}
