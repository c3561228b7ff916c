import { randomUUID } from 'node:crypto'
import type { FirstFirm } from '@shared/api/setup'
import { anyAccount, insertAccount } from '@server/repositories/accounts'
import { recordEvent } from '@server/repositories/auditEvents'
import { insertFirm } from '@server/repositories/firms'
import { insertMembership } from '@server/repositories/memberships'
import { takeTurn } from '@server/repositories/schema'
import { firmScope, inTransaction, systemScope } from '@server/repositories/transaction'
import type { Database } from '@server/repositories/transaction'
import { conflict } from './refusals'
import { hashPassword, refuseWeak } from './session/passwords'

const SETUP_TURN = 4_180_002

/** Whether there is no firm yet. Firms and accounts are made together, and accounts belong to no firm's rows. */
export const needsSetup = async (dataSource: Database): Promise<boolean> =>
  !(await inTransaction(systemScope(dataSource), anyAccount))

/**
 * Makes the first firm and its administrator; further firms are not made over the network.
 * @returns the administrator's account
 * @throws {Refusal} once there is a firm
 */
export const setUpFirstFirm = async (
  dataSource: Database,
  { firm, person }: Pick<FirstFirm, 'firm' | 'person'>,
): Promise<string> => {
  refuseWeak(person.password, person, 'person.password')
  const passwordHash = await hashPassword(person.password)
  const accountId = randomUUID()
  const scope = firmScope(dataSource, { firmId: randomUUID(), accountId, role: 'administrator' })
  await inTransaction(scope, async (tx) => {
    await takeTurn(tx, SETUP_TURN)
    if (await anyAccount(tx)) throw conflict('This installation has its first firm already. Sign in instead.')
    await insertAccount(tx, {
      id: accountId,
      email: person.email,
      name: person.name,
      passwordHash,
      isDemo: false,
    })
    await insertFirm(tx, firm)
    await insertMembership(tx, { id: randomUUID(), accountId, role: 'administrator' })
    await recordEvent(tx, { action: 'firm.create', subjectId: scope.firmId, details: { name: firm.name } })
  })
  return accountId
}
