import { inTray } from '@shared/api/inTray'
import { request } from './request'

export const readInTray = (signal?: AbortSignal) => request('/in-tray', { answer: inTray, signal })
