/** Makes the demo's firm through the application's own services, so that it holds nothing they would refuse. */
import { importText } from '@shared/sheet/text'
import { newProject } from '@shared/api/projects'
import { findAccountByEmail, markAsDemo, setPasswordHash } from '@server/repositories/accounts'
import { ownMemberships } from '@server/repositories/memberships'
import { accountScope, firmScope, inTransaction, systemScope } from '@server/repositories/transaction'
import type { Database, FirmScope } from '@server/repositories/transaction'
import { createCalculationFromSheet } from '../services/calculations/createCalculation'
import { appoint } from '../services/participation/appoint'
import { addPerson } from '../services/people/addPerson'
import { createProject } from '../services/projects/createProject'
import { hashPassword } from '../services/session/passwords'
import { setUpFirstFirm } from '../services/setUpFirstFirm'
import { DEMO_PASSWORD, emailOf, firm, people } from './people'
import type { PersonKey } from './people'
import { calculations, projects } from './work'

const DAY_MS = 86_400_000

type Scopes = ReadonlyMap<PersonKey, FirmScope>

const scopeOf = (scopes: Scopes, key: PersonKey): FirmScope => {
  const scope = scopes.get(key)
  if (!scope) throw new Error(`The demo has no ${key}`)
  return scope
}

/** Everybody with a password that the demo tells. */
const seedPeople = async (database: Database): Promise<Scopes> => {
  const [administrator, ...others] = people
  const accountId = await setUpFirstFirm(database, {
    firm,
    person: { name: administrator.name, email: emailOf(administrator.key), password: DEMO_PASSWORD },
  })
  const [membership] = await inTransaction(accountScope(database, accountId), ownMemberships)
  if (!membership) throw new Error('The firm that was just made has no administrator')
  const { firmId } = membership
  const scopes = new Map<PersonKey, FirmScope>([
    [administrator.key, firmScope(database, { firmId, accountId, role: administrator.role })],
  ])
  for (const { key, name, role } of others) {
    await addPerson(scopeOf(scopes, administrator.key), { name, email: emailOf(key), role })
    const account = await inTransaction(systemScope(database), (tx) => findAccountByEmail(tx, emailOf(key)))
    if (!account) throw new Error(`${name} was not added`)
    scopes.set(key, firmScope(database, { firmId, accountId: account.id, role }))
  }
  const passwordHash = await hashPassword(DEMO_PASSWORD)
  await inTransaction(systemScope(database), async (tx) => {
    const ids = [...scopes.values()].map((scope) => scope.accountId)
    for (const id of ids) await setPasswordHash(tx, id, passwordHash)
    await markAsDemo(tx, ids)
  })
  return scopes
}

/** @param now the calculations' due days count from it */
export const seedDemo = async (database: Database, now: Date): Promise<void> => {
  const scopes = await seedPeople(database)
  const projectIds = new Map<string, string>()
  for (const [key, project] of Object.entries(projects)) {
    const made = await createProject(scopeOf(scopes, 'mara'), newProject.parse(project))
    projectIds.set(key, made.project.id)
  }
  for (const { project, by, text, dueInDays, appointments } of calculations) {
    const { sheet, heading, problems } = importText(text)
    if (!sheet) throw new Error(`A calculation of the demo cannot be read: ${problems[0]?.message ?? ''}`)
    const due = new Date(now.getTime() + dueInDays * DAY_MS).toISOString().slice(0, 10)
    const made = await createCalculationFromSheet(
      scopeOf(scopes, by),
      { projectId: projectIds.get(project) ?? '', title: heading.title ?? '', dueOn: due },
      sheet,
    )
    for (const { person, part, note = '' } of appointments) {
      const { accountId } = scopeOf(scopes, person)
      await appoint(scopeOf(scopes, by), made.calculation.id, { accountId, part, note })
    }
  }
}
