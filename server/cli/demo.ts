/** Run by the start where the demo is on: makes its firm on an empty installation, and prints its people. */
import { readConfig } from '../config'
import { createDataSource } from '../data-source'
import { DEMO_PASSWORD, emailOf, firm, people } from '../demo/people'
import { seedDemo } from '../demo/seed'
import { listDemoPeople } from '../services/session/demoPeople'
import { needsSetup } from '../services/setUpFirstFirm'

const database = createDataSource(readConfig().databaseUrl, { poolSize: 2 })
await database.initialize()
try {
  if (await needsSetup(database)) await seedDemo(database, new Date())
  if ((await listDemoPeople(database)).length > 0) {
    const rows = people.map(({ key, name, role, does }) =>
      [name.padEnd(18), role.padEnd(15), emailOf(key).padEnd(32), does].join(''),
    )
    console.log(`Demo accounts of ${firm.name}; the password of each is: ${DEMO_PASSWORD}\n`)
    console.log(rows.map((row) => `  ${row}`).join('\n'))
  }
} finally {
  await database.destroy()
}
