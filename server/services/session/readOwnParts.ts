import type { Participation } from '@server/entities'
import { participationsOf } from '@server/repositories/participations'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope } from '@server/repositories/transaction'

/** The person's present parts in the firm. */
export const readOwnParts = (scope: FirmScope): Promise<Participation[]> =>
  inTransaction(scope, (tx) => participationsOf(tx, scope.accountId))
