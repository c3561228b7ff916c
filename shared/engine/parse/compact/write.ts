import type { CompactFields } from './fields'
import { writeTail } from './tail'
import { writeTolerance } from './tolerance'

const statementOf = (fields: CompactFields): string => {
  switch (fields.kind) {
    case 'given': {
      const { tolerance } = fields
      const spread = tolerance === undefined || 'fit' in tolerance ? '' : writeTolerance(tolerance)
      return `${fields.symbol} = ${fields.value}${fields.unit === '' ? '' : ` ${fields.unit}`}${spread}`
    }
    case 'formula':
      return `${fields.symbol} = ${fields.expression}${fields.unit === '' ? '' : ` to ${fields.unit}`}`
    case 'criterion': {
      const limit = fields.upper === undefined ? fields.limit : `${fields.limit} .. ${fields.upper}`
      return `${fields.symbol === '' ? '' : `${fields.symbol}: `}${fields.demand} ${fields.relation} ${limit}`
    }
  }
}

/** The fields in one line, whether or not they can be read back from it. */
export const written = (fields: CompactFields): string => {
  const fit =
    fields.kind === 'given' && fields.tolerance && 'fit' in fields.tolerance
      ? fields.tolerance.fit
      : undefined
  const tail = fit === undefined ? fields : { ...fields, fields: { tolerance: fit, ...fields.fields } }
  return statementOf(fields) + writeTail(tail)
}
