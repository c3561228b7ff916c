/**
 * Appending: updates that wait together get their numbers from the document's row and are stored with
 * their edit record in one transaction; pens and client ids are checked inside it, so that they hold
 * across processes.
 */
import { closeCodes } from '@shared/protocol'
import { insertContributions, type ContributionRow } from '@server/repositories/contributions'
import { bindClients, insertUpdates, raiseHead } from '@server/repositories/documentUpdates'
import { readPens } from '@server/repositories/pens'
import { inTransaction, type FirmScope, type FirmTransaction } from '@server/repositories/transaction'
import type { Recorded } from './editRecord'
import type { Member } from './member'

/** An update that was applied to the server's copy and is to be stored. */
export interface Step {
  from: Member
  number: number
  update: Uint8Array
  recorded: Recorded
  /** Client ids whose owner is not known in memory yet; `isFresh` where the document has nothing by it. */
  unboundWriters: { clientId: number; isFresh: boolean }[]
}

/** The row did not fit any more: closed to edits, or opened again since. */
export class MovedOn extends Error {}

/** Some steps may not be stored; the others are to be tried again without them. */
export class StepsRefused extends Error {
  constructor(readonly codes: Map<Step, number>) {
    super('updates refused')
  }
}

export interface Appended {
  head: number
  owners: Map<number, string>
}

/**
 * @throws {MovedOn} {StepsRefused} with nothing stored
 * @throws whatever the database says; then it is not known whether it was stored
 */
export const appendGroup = (scope: FirmScope, id: string, epoch: number, steps: Step[]): Promise<Appended> =>
  inTransaction(scope, async (tx) => {
    const bytes = steps.reduce((sum, step) => sum + step.update.length, 0)
    const raised = await raiseHead(tx, id, epoch, steps.length, bytes)
    if (raised === undefined) throw new MovedOn()
    const refused = new Map<Step, number>()
    const owners = await bindWriters(tx, id, steps, refused)
    await checkPens(tx, id, steps, refused)
    if (refused.size > 0) throw new StepsRefused(refused)
    const first = raised.head - steps.length + 1
    await insertUpdates(
      tx,
      id,
      steps.map((step, index) => ({
        head: first + index,
        accountId: step.from.accountId,
        clientId: step.from.clientId,
        bytes: Buffer.from(step.update),
      })),
    )
    await insertContributions(tx, id, contributionsOf(steps, first))
    return { head: raised.head, owners }
  })

const bindWriters = async (
  tx: FirmTransaction,
  id: string,
  steps: Step[],
  refused: Map<Step, number>,
): Promise<Map<number, string>> => {
  const wanted = steps.flatMap((step) =>
    step.unboundWriters.map((writer) => ({ ...writer, accountId: step.from.accountId })),
  )
  if (wanted.length === 0) return new Map()
  // What the server itself wrote is bound to nobody, and nobody may go on under its client id.
  const fresh = wanted.filter((writer) => writer.isFresh)
  const owners = await bindClients(
    tx,
    id,
    fresh,
    wanted.map((writer) => writer.clientId),
  )
  for (const step of steps)
    if (step.unboundWriters.some((writer) => owners.get(writer.clientId) !== step.from.accountId))
      refused.set(step, closeCodes.foreignClient)
  return owners
}

const checkPens = async (
  tx: FirmTransaction,
  id: string,
  steps: Step[],
  refused: Map<Step, number>,
): Promise<void> => {
  const keys = [...new Set(steps.flatMap((step) => [...step.recorded.pens]))]
  if (keys.length === 0) return
  const pens = new Map((await readPens(tx, id, keys)).map((pen) => [pen.key, pen]))
  for (const step of steps) {
    const holds = (key: string): boolean => {
      const pen = pens.get(key)
      return pen?.holder === step.from.accountId && pen.clientId === step.from.clientId
    }
    if (![...step.recorded.pens].every(holds)) refused.set(step, closeCodes.penOfAnother)
  }
}

const contributionsOf = (steps: Step[], first: number): ContributionRow[] =>
  steps.flatMap((step, index) =>
    step.recorded.entries.map((entry, position) => ({
      ...entry,
      head: first + index,
      position,
      accountId: step.from.accountId,
    })),
  )
