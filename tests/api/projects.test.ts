import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { project, projectList } from '@shared/api/projects'
import { startServer } from '../support/server'
import type { Client, TestServer } from '../support/server'

let office: TestServer
let administrator: Client
let engineer: Client

beforeAll(async () => {
  office = await startServer()
  administrator = await office.signIn('administrator')
  engineer = await office.signIn('engineer')
})
afterAll(() => office?.close())

describe('a project', () => {
  test('has a number, a client, the law of a place, disciplines and a supervision level', async () => {
    const wanted = {
      number: 'P-100',
      name: 'Rolling mill, stand 3',
      client: 'Bergslag Steel',
      jurisdiction: 'Sweden',
      disciplines: ['mechanical', 'structural'],
      supervision: 'DSL3',
    }
    const made = project.parse((await engineer.post('/api/projects').send(wanted).expect(201)).body)
    expect(made).toMatchObject({ ...wanted, calculations: 0 })
    expect(project.parse((await engineer.get(`/api/projects/${made.id}`).expect(200)).body)).toEqual(made)
  })

  test('has supervision level DSL2 where none is named, and counts its calculations', async () => {
    const made = await office.addProject(engineer)
    expect(made.supervision).toBe('DSL2')
    await office.addCalculation(engineer, { projectId: made.id })
    const { projects } = projectList.parse((await engineer.get('/api/projects').expect(200)).body)
    expect(projects.find((one) => one.id === made.id)?.calculations).toBe(1)
  })

  test('with a number that is taken is a conflict; in another firm it is not', async () => {
    await engineer.post('/api/projects').send({ number: 'P-7', name: 'x' }).expect(201)
    const answer = await engineer.post('/api/projects').send({ number: 'P-7', name: 'y' }).expect(409)
    expect(answer.body.error.message).toBe('There is a project P-7 already. Choose another number.')
    const stranger = await office.signIn('stranger')
    await stranger.post('/api/projects').send({ number: 'P-7', name: 'y' }).expect(201)
  })

  test('is changed by an administrator only', async () => {
    const made = await office.addProject(engineer)
    const refused = await engineer.patch(`/api/projects/${made.id}`).send({ supervision: 'DSL1' }).expect(403)
    expect(refused.body.error.message).toMatch(/supervision level binds everybody/)
    const answer = await administrator
      .patch(`/api/projects/${made.id}`)
      .send({ supervision: 'DSL1' })
      .expect(200)
    expect(answer.body).toMatchObject({ supervision: 'DSL1', name: made.name })
    await administrator.patch(`/api/projects/${made.id}`).send({ number: 'P-7' }).expect(409)
    await administrator.patch(`/api/projects/${made.id}`).send({}).expect(200)
    await administrator.patch(`/api/projects/${made.id}`).send({ supervision: 'none' }).expect(400)
  })

  test.each([
    [{ name: 'x' }, 'number'],
    [{ number: 'P-8', name: ' ' }, 'name'],
    [{ number: 'P-8', name: 'x', supervision: 'DSL4' }, 'supervision'],
    [{ number: 'P-8', name: 'x', disciplines: 'mechanical' }, 'disciplines'],
    [{ number: 'P-8', name: 'x', disciplines: Array(13).fill('d') }, 'disciplines'],
  ])('bad input %# is refused at its field', async (wanted, field) => {
    const answer = await engineer.post('/api/projects').send(wanted).expect(400)
    expect(answer.body.error.fields[0].path).toBe(field)
  })

  test('is nothing for observers', async () => {
    const observer = await office.signIn('observer')
    const made = await office.addProject(engineer)
    await observer.get('/api/projects').expect(403)
    await observer.get(`/api/projects/${made.id}`).expect(403)
    await observer.post('/api/projects').send({ number: 'P-9', name: 'x' }).expect(403)
    await observer.patch(`/api/projects/${made.id}`).send({ name: 'x' }).expect(403)
  })
})
