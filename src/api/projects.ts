import { project, projectList, type ChangeProject, type NewProjectInput } from '@shared/api/projects'
import { request } from './request'

export const listProjects = (signal?: AbortSignal) => request('/projects', { answer: projectList, signal })

export const createProject = (body: NewProjectInput) =>
  request('/projects', { method: 'POST', body, answer: project })

export const changeProject = (id: string, body: ChangeProject) =>
  request(`/projects/${id}`, { method: 'PATCH', body, answer: project })
