import { Router } from 'express'
import { addPerson as addPersonSchema, changePerson as changePersonSchema } from '@shared/api/people'
import type { PeopleList } from '@shared/api/people'
import { idOf, input, scopeOf } from '@server/middleware/request'
import { presentInvited, presentPerson } from '@server/presenters/people'
import { addPerson } from '@server/services/people/addPerson'
import { changePerson } from '@server/services/people/changePerson'
import { listPeople } from '@server/services/people/listPeople'
import { renewLink } from '@server/services/people/renewLink'
import type { RouteParts } from './parts'

export const peopleRoutes = ({ sockets }: RouteParts): Router => {
  const router = Router()

  router.get('/people', async (request, response) => {
    const list: PeopleList = { people: (await listPeople(scopeOf(request))).map(presentPerson) }
    response.json(list)
  })

  router.post('/people', async (request, response) => {
    const scope = scopeOf(request)
    response.status(201).json(presentInvited(await addPerson(scope, input(addPersonSchema, request.body))))
  })

  router.patch('/people/:id', async (request, response) => {
    const scope = scopeOf(request)
    const id = idOf(request, 'id', 'person')
    const person = await changePerson(scope, id, input(changePersonSchema, request.body))
    sockets.rightsChanged(id)
    response.json(presentPerson(person))
  })

  router.post('/people/:id/link', async (request, response) => {
    const scope = scopeOf(request)
    response.json(presentInvited(await renewLink(scope, idOf(request, 'id', 'person'))))
  })

  return router
}
