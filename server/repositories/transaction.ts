/**
 * The one way into the database. A scope says for whom; the transaction tells PostgreSQL, whose
 * row-level security then shows that firm's rows only, and gives its connection back on every path.
 *
 * - `FirmScope`: a member at work in a firm. Repositories of everything below a firm need it.
 * - `AccountScope`: somebody signed in who has not chosen a firm: sees own memberships and firms.
 * - `SystemScope`: no firm: accounts, one-time links, rate windows; sees no row below any firm.
 */
import type { DataSource, EntityManager } from 'typeorm'
import type { FirmRole } from '@shared/review/permissions'

/** The connection to the database, for code that only hands it on: TypeORM is known here and below. */
export type Database = DataSource

declare const brand: unique symbol

export interface SystemScope {
  readonly kind: 'system'
  readonly dataSource: DataSource
}

export interface AccountScope {
  readonly kind: 'account'
  readonly dataSource: DataSource
  readonly accountId: string
}

export interface FirmScope {
  readonly kind: 'firm'
  readonly dataSource: DataSource
  readonly firmId: string
  readonly accountId: string
  readonly role: FirmRole
  readonly [brand]: 'firm'
}

export type Scope = SystemScope | AccountScope | FirmScope

export const systemScope = (dataSource: DataSource): SystemScope => ({ kind: 'system', dataSource })

export const accountScope = (dataSource: DataSource, accountId: string): AccountScope => ({
  kind: 'account',
  dataSource,
  accountId,
})

/** To be made only from a membership that was read and is active, or for the firm that is being made. */
export const firmScope = (
  dataSource: DataSource,
  membership: { firmId: string; accountId: string; role: FirmRole },
): FirmScope =>
  ({
    kind: 'firm',
    dataSource,
    firmId: membership.firmId,
    accountId: membership.accountId,
    role: membership.role,
  }) as FirmScope

/** An open transaction: hand `tx` to repositories; one that is outside of it would wait for a second connection. */
export interface Transaction<S extends Scope = Scope> {
  readonly manager: EntityManager
  readonly scope: S
}
export type FirmTransaction = Transaction<FirmScope>

/** Commits when `work` resolves; rolls back and rethrows when it throws. */
export const inTransaction = async <S extends Scope, T>(
  scope: S,
  work: (tx: Transaction<S>) => Promise<T>,
): Promise<T> => {
  const runner = scope.dataSource.createQueryRunner()
  try {
    await runner.connect()
    await runner.startTransaction()
    try {
      await runner.query(
        `SELECT set_config('torfolio.firm', $1, true), set_config('torfolio.account', $2, true)`,
        [scope.kind === 'firm' ? scope.firmId : '', scope.kind === 'account' ? scope.accountId : ''],
      )
      const result = await work({ manager: runner.manager, scope })
      await runner.commitTransaction()
      return result
    } catch (error) {
      // The connection may be gone, and then so is the transaction: the first error is the one to tell.
      await runner.rollbackTransaction().catch(() => undefined)
      throw error
    }
  } finally {
    await runner.release()
  }
}
