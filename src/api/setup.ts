import { me } from '@shared/api/session'
import type { FirstFirmInput } from '@shared/api/setup'
import { request } from './request'

export const makeFirstFirm = (body: FirstFirmInput) => request('/setup', { method: 'POST', body, answer: me })
