import { history, revision } from '@shared/api/revisions'
import { queryOf, request } from './request'

export const readRevision = (id: string, signal?: AbortSignal) =>
  request(`/revisions/${id}`, { answer: revision, signal })

/** The edit record of one line, heading or front text, or of the whole sheet. */
export const readHistory = (id: string, subject?: string, signal?: AbortSignal) =>
  request(`/revisions/${id}/history${queryOf({ subject })}`, { answer: history, signal })
