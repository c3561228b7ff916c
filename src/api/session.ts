import {
  demoPeople,
  link,
  me,
  sessionStatus,
  type ChangePassword,
  type SetPassword,
  type SignIn,
} from '@shared/api/session'
import { request } from './request'

export const readSession = () => request('/session', { answer: sessionStatus })

export const signIn = (body: SignIn) => request('/session', { method: 'POST', body, answer: me })

export const signOut = () => request('/session', { method: 'DELETE', answer: null })

export const chooseFirm = (firmId: string) =>
  request('/session/firm', { method: 'PUT', body: { firmId }, answer: me })

export const changePassword = (body: ChangePassword) =>
  request('/session/password', { method: 'PUT', body, answer: null })

export const listDemoPeople = (signal?: AbortSignal) =>
  request('/demo/people', { answer: demoPeople, signal })

export const continueAs = (accountId: string) =>
  request('/demo/session', { method: 'POST', body: { accountId }, answer: me })

export const lookUpLink = (token: string) =>
  request('/links/look-up', { method: 'POST', body: { token }, answer: link })

export const setPassword = (body: SetPassword) =>
  request('/links/password', { method: 'POST', body, answer: null })
