/** An application process as far as collaboration goes; who connects says by a header who they are. */
import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import type { DataSource } from 'typeorm'
import {
  attachCollaboration,
  type Collaboration,
  type CollaborationOptions,
} from '@server/collaboration/attach'
import { createDataSource } from '@server/data-source'
import { authoriseDocument } from '@server/services/revisions/authoriseDocument'

export const origin = 'http://sheet.test'

export interface Process {
  server: Server
  dataSource: DataSource
  collaboration: Collaboration
  address: string
  failures: unknown[]
  stop(): Promise<void>
}

export const startProcess = async (
  url: string,
  options: Partial<CollaborationOptions> & { port?: number } = {},
): Promise<Process> => {
  const failures: unknown[] = []
  const dataSource = await createDataSource(url, { poolSize: 6 }).initialize()
  const server = createServer((_request, response) => response.end())
  const names = new Map<string, string>()
  const collaboration = await attachCollaboration(server, {
    dataSource,
    authenticate: async (request) => {
      const accountId = request.headers['x-account']
      if (typeof accountId !== 'string') return undefined
      let name = names.get(accountId)
      if (name === undefined) {
        const rows: { name: string }[] = await dataSource.query('SELECT name FROM account WHERE id = $1', [
          accountId,
        ])
        name = rows[0]?.name ?? '?'
        names.set(accountId, name)
      }
      return { accountId, name }
    },
    authorise: (accountId, documentId) => authoriseDocument(dataSource, accountId, documentId),
    isOriginAllowed: (said) => said === undefined || said === origin,
    failed: (error) => failures.push(error),
    lingerMs: 50,
    heartbeatMs: 300,
    ...options,
  })
  await new Promise<void>((resolve) => server.listen(options.port ?? 0, '127.0.0.1', resolve))
  const { port } = server.address() as AddressInfo
  return {
    server,
    dataSource,
    collaboration,
    address: `ws://127.0.0.1:${port}`,
    failures,
    stop: async () => {
      await collaboration.close()
      await new Promise((resolve) => server.close(resolve))
      await dataSource.destroy()
    },
  }
}
