import { template, templateList } from '@shared/api/templates'
import { request } from './request'

export const listTemplates = (signal?: AbortSignal) => request('/templates', { answer: templateList, signal })

export const readTemplate = (name: string, signal?: AbortSignal) =>
  request(`/templates/${encodeURIComponent(name)}`, { answer: template, signal })
