import { Router } from 'express'
import { changeProject as changeProjectSchema, newProject } from '@shared/api/projects'
import type { ProjectList } from '@shared/api/projects'
import { idOf, input, scopeOf } from '@server/middleware/request'
import { presentProject } from '@server/presenters/projects'
import { changeProject } from '@server/services/projects/changeProject'
import { createProject } from '@server/services/projects/createProject'
import { listProjects, readProject } from '@server/services/projects/listProjects'

export const projectRoutes = (): Router => {
  const router = Router()

  router.get('/projects', async (request, response) => {
    const list: ProjectList = { projects: (await listProjects(scopeOf(request))).map(presentProject) }
    response.json(list)
  })

  router.post('/projects', async (request, response) => {
    const scope = scopeOf(request)
    response.status(201).json(presentProject(await createProject(scope, input(newProject, request.body))))
  })

  router.get('/projects/:id', async (request, response) => {
    const scope = scopeOf(request)
    response.json(presentProject(await readProject(scope, idOf(request, 'id', 'project'))))
  })

  router.patch('/projects/:id', async (request, response) => {
    const scope = scopeOf(request)
    const id = idOf(request, 'id', 'project')
    response.json(presentProject(await changeProject(scope, id, input(changeProjectSchema, request.body))))
  })

  return router
}
