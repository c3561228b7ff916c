import { invited, peopleList, person, type AddPerson, type ChangePerson } from '@shared/api/people'
import { request } from './request'

export const listPeople = (signal?: AbortSignal) => request('/people', { answer: peopleList, signal })

export const addPerson = (body: AddPerson) => request('/people', { method: 'POST', body, answer: invited })

export const changePerson = (id: string, body: ChangePerson) =>
  request(`/people/${id}`, { method: 'PATCH', body, answer: person })

export const renewLink = (id: string) => request(`/people/${id}/link`, { method: 'POST', answer: invited })
