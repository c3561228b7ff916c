/** Printed pages as a reader sees them: their text, page by page, by Debian's poppler-utils. */
import { execFileSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'

const withFile = <Result>(pdf: Uint8Array, read: (path: string) => Result): Result => {
  const folder = mkdtempSync(join(tmpdir(), 'torfolio-print-'))
  const path = join(folder, 'pages.pdf')
  try {
    writeFileSync(path, pdf)
    return read(path)
  } finally {
    rmSync(folder, { recursive: true })
  }
}

/** Text of each page as it is laid out, spaces run together; mathematical italics as plain letters. */
export const textOfPages = (pdf: Uint8Array): string[] =>
  withFile(pdf, (path) =>
    execFileSync('pdftotext', ['-layout', path, '-'], {
      encoding: 'utf8',
      stdio: ['ignore', 'pipe', 'ignore'],
    }),
  )
    .split('\f')
    .slice(0, -1)
    .map((page) => page.normalize('NFKC').replace(/[ \t]+/g, ' '))

/** What `pdfinfo` says: title, author, page size, … */
export const factsOf = (pdf: Uint8Array): string =>
  withFile(pdf, (path) =>
    execFileSync('pdfinfo', [path], { encoding: 'utf8', stdio: ['ignore', 'pipe', 'ignore'] }),
  )

export const fontsOf = (pdf: Uint8Array): string =>
  withFile(pdf, (path) =>
    execFileSync('pdffonts', [path], { encoding: 'utf8', stdio: ['ignore', 'pipe', 'ignore'] }),
  )
