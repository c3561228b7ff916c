/**
 * The press: a process of its own that composes the pages of a sheet and sets them with Typst, and can be
 * killed at any moment, since setting blocks its thread. Takes one order, answers, ends.
 */
import { createRequire } from 'node:module'
import { readFileSync } from 'node:fs'
import { NodeCompiler } from '@myriaddreamin/typst-ts-node-compiler'
import { composePages } from './compose/composePages'
import type { PressAnswer, PressOrder } from './order'

const WORKSPACE = '/torfolio'

const fontFiles = ['400Regular', '400Regular_Italic', '600SemiBold', '600SemiBold_Italic'].map(
  (face) => `@expo-google-fonts/lora/${face}/Lora_${face}.ttf`,
)

/** From the package, wherever it is installed; nothing else of the machine's fonts is ever named. */
const fonts = (): Buffer[] => {
  const { resolve } = createRequire(import.meta.url)
  return fontFiles.map((file) => readFileSync(resolve(file)))
}

/** Typst's own words on what went wrong; for the log. */
const reasonOf = (error: unknown): string =>
  (error instanceof Error ? error.message : String(error)).slice(0, 4000)

const set = ({ program, pages: request, printedAt }: PressOrder): PressAnswer => {
  const started = performance.now()
  const pages = composePages(request)
  const composed = performance.now()
  const compiler = NodeCompiler.create({ workspace: WORKSPACE, fontArgs: [{ fontBlobs: fonts() }] })
  for (const [name, source] of Object.entries(program)) compiler.addSource(`${WORKSPACE}/${name}`, source)

  const compile = (content: typeof pages) => {
    compiler.mapShadow(`${WORKSPACE}/pages.json`, Buffer.from(JSON.stringify(content)))
    const result = compiler.compile({ mainFilePath: `${WORKSPACE}/main.typ`, resetRead: true })
    const { result: document } = result
    if (document) return document
    const diagnostics = result.takeDiagnostics()
    throw new Error(diagnostics ? JSON.stringify(diagnostics.shortDiagnostics) : 'Typst gave no reason.')
  }
  const timing = (numOfPages: number) => ({
    pages: numOfPages,
    composeMs: Math.round(composed - started),
    setMs: Math.round(performance.now() - composed),
  })

  const document = compile(pages)
  try {
    const pdf = compiler.pdf(document, { pdfStandard: 'a-3b', creationTimestamp: printedAt })
    return { is: 'pdf', pdf, archival: true, ...timing(document.numOfPages) }
  } catch (error) {
    // A character that is in no font is refused in an archival file: print all the same, and say so.
    if (!/could not be displayed/.test(reasonOf(error))) throw error
    const notice = {
      severity: 'error' as const,
      text: 'Some characters of this sheet are in no font of the print and show as empty boxes. Read them on the screen.',
    }
    const noted = compile({ ...pages, notices: [notice, ...pages.notices] })
    const pdf = compiler.pdf(noted, { creationTimestamp: printedAt })
    return { is: 'pdf', pdf, archival: false, ...timing(noted.numOfPages) }
  }
}

process.once('message', (order: PressOrder) => {
  let answer: PressAnswer
  try {
    answer = set(order)
  } catch (error) {
    answer = { is: 'failed', reason: reasonOf(error) }
  }
  process.send?.(answer, () => process.disconnect())
})
