import { In, IsNull } from 'typeorm'
import type { Part } from '@shared/review/permissions'
import { Participation } from '../entities'
import type { FirmTransaction } from './transaction'

/** Parts in force on some calculations, in the order in which they were given. */
export const currentParticipations = (
  tx: FirmTransaction,
  calculationIds: string[],
): Promise<Participation[]> =>
  calculationIds.length === 0
    ? Promise.resolve([])
    : tx.manager.find(Participation, {
        where: { firmId: tx.scope.firmId, calculationId: In(calculationIds), endedAt: IsNull() },
        order: { appointedAt: 'ASC', id: 'ASC' },
      })

/** Parts in force of one person in the firm. */
export const participationsOf = (tx: FirmTransaction, accountId: string): Promise<Participation[]> =>
  tx.manager.findBy(Participation, { firmId: tx.scope.firmId, accountId, endedAt: IsNull() })

export const partsOf = async (
  tx: FirmTransaction,
  calculationId: string,
  accountId: string,
): Promise<Part[]> => {
  const rows = await tx.manager.findBy(Participation, {
    firmId: tx.scope.firmId,
    calculationId,
    accountId,
    endedAt: IsNull(),
  })
  return rows.map((row) => row.part)
}

export const insertParticipation = async (
  tx: FirmTransaction,
  participation: Pick<Participation, 'id' | 'calculationId' | 'accountId' | 'part' | 'note'>,
): Promise<void> => {
  await tx.manager.insert(Participation, {
    ...participation,
    firmId: tx.scope.firmId,
    appointedBy: tx.scope.accountId,
  })
}

export const endParticipationRow = async (tx: FirmTransaction, id: string): Promise<void> => {
  await tx.manager.update(Participation, { firmId: tx.scope.firmId, id }, { endedAt: new Date() })
}

/** How many calculations each person of the firm has a part on. */
export const countParts = async (tx: FirmTransaction): Promise<Map<string, number>> => {
  const rows: { id: string; count: number }[] = await tx.manager.query(
    `SELECT account_id AS id, count(DISTINCT calculation_id)::int AS count FROM participation
     WHERE firm_id = $1 AND ended_at IS NULL GROUP BY account_id`,
    [tx.scope.firmId],
  )
  return new Map(rows.map((row) => [row.id, row.count]))
}
