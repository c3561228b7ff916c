/** The built client: its files, and for every address of a page the one HTML file, with this answer's nonce in it. */
import { readFile } from 'node:fs/promises'
import { join } from 'node:path'
import { Router, static as serveFiles } from 'express'
import type { Config } from '@server/config'

/** Stands in the HTML file for the nonce; where it does not, a meta element brings it in. */
const PLACE = '{{nonce}}'

const withNonce = (html: string, nonce: string): string =>
  html.includes(PLACE)
    ? html.replaceAll(PLACE, nonce)
    : html.replace('<head>', `<head>\n    <meta property="csp-nonce" nonce="${nonce}" content="${nonce}" />`)

const notBuilt = 'The client has not been built yet. Run: npm run build\n'

export const clientRoutes = ({ clientFolder }: Pick<Config, 'clientFolder'>): Router => {
  const router = Router()
  // Their names change with their content.
  router.use(
    '/assets',
    serveFiles(join(clientFolder, 'assets'), {
      immutable: true,
      maxAge: '365d',
      index: false,
      fallthrough: false,
    }),
  )
  router.use(serveFiles(clientFolder, { index: false, maxAge: '1h' }))
  router.get('/{*path}', async (request, response) => {
    const page = await readFile(join(clientFolder, 'index.html'), 'utf8').catch(() => undefined)
    response.set('Cache-Control', 'no-store')
    if (page === undefined) return void response.status(503).type('text/plain').send(notBuilt)
    response.type('html').send(withNonce(page, String(response.locals['nonce'])))
  })
  return router
}
