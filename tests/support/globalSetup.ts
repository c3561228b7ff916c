/** Before any test: a running test cluster; its address reaches the workers by the environment. */
import { clusterHome, startCluster } from '../../server/bootstrap/postgres.mjs'

export default async function setup(): Promise<() => void> {
  const cluster = await startCluster({ home: clusterHome('tests'), durable: false })
  process.env['TORFOLIO_TEST_CLUSTER'] = JSON.stringify({
    super: cluster.superUrl('{database}'),
    owner: cluster.ownerUrl('{database}'),
    app: cluster.appUrl('{database}'),
  })
  return () => cluster.stop()
}
