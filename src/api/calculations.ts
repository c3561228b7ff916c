import {
  calculation,
  calculationList,
  type CalculationFilter,
  type ChangeTitleBlock,
  type NewCalculationInput,
} from '@shared/api/calculations'
import { queryOf, request } from './request'

export const listCalculations = (filter: CalculationFilter, signal?: AbortSignal) =>
  request(`/calculations${queryOf(filter)}`, { answer: calculationList, signal })

export const readCalculation = (id: string, signal?: AbortSignal) =>
  request(`/calculations/${id}`, { answer: calculation, signal })

export const createCalculation = (body: NewCalculationInput) =>
  request('/calculations', { method: 'POST', body, answer: calculation })

export const changeTitleBlock = (id: string, body: ChangeTitleBlock) =>
  request(`/calculations/${id}`, { method: 'PATCH', body, answer: calculation })
