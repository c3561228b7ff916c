import { participationList, type AppointInput, type HandOverInput } from '@shared/api/participation'
import { request } from './request'

const place = (calculationId: string) => `/calculations/${calculationId}/participations`

export const appoint = (calculationId: string, body: AppointInput) =>
  request(place(calculationId), { method: 'POST', body, answer: participationList })

export const handOver = (calculationId: string, participationId: string, body: HandOverInput) =>
  request(`${place(calculationId)}/${participationId}/hand-over`, {
    method: 'POST',
    body,
    answer: participationList,
  })

export const endPart = (calculationId: string, participationId: string) =>
  request(`${place(calculationId)}/${participationId}`, { method: 'DELETE', answer: participationList })
