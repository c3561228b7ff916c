export interface Cluster {
  port: number
  superUrl(database: string): string
  ownerUrl(database: string): string
  appUrl(database: string): string
  sessionSecret: string
  ensureDatabase(name: string): void
  stop(): void
}
export function ensurePrograms(): string
export function clusterHome(name: string, dataFolder?: string): string
export function startCluster(options: { home: string; durable: boolean }): Promise<Cluster>
