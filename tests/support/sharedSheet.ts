/** One sheet that two people prepare, each in a browser profile of their own and on a network of their own. */
import type { Browser } from 'playwright-core'
import type { ServerProcess } from './serverProcess'
import type { PersonName } from './server'
import { expectNoFaults, openSheetPage, type SheetPage } from './sheetPage'

export interface Shared {
  calculation: string
  documentId: string
  revisionId: string
}

/** A calculation of the engineer's that the colleague prepares, too. */
export const newShared = async (office: ServerProcess, template?: string): Promise<Shared> => {
  const client = await office.signIn('engineer')
  const made = await office.addCalculation(
    client,
    template === undefined ? {} : { beginning: { kind: 'template', template, givens: {} } },
  )
  return share(office, made.id)
}

/** Makes the colleague a second preparer of a calculation that the engineer has begun. */
export const share = async (office: ServerProcess, calculation: string): Promise<Shared> => {
  const client = await office.signIn('engineer')
  await client
    .post(`/api/calculations/${calculation}/participations`)
    .send({ accountId: office.people.colleague.id, part: 'preparer' })
    .expect(201)
  const { body: found } = await client.get(`/api/calculations/${calculation}`).expect(200)
  const revisionId = found.revisions[0].id as string
  const { body } = await client.get(`/api/revisions/${revisionId}`).expect(200)
  return { calculation, revisionId, documentId: body.document.documentId as string }
}

export const openShared = (
  office: ServerProcess,
  browser: Browser,
  person: PersonName,
  { calculation }: Shared,
): Promise<SheetPage> =>
  openSheetPage(browser, office, { person, address: office.addressOf(person), calculation })

/** Both on the same sheet; closed when `work` is done, and neither page may have had a fault. */
export const together = async (
  office: ServerProcess,
  browser: Browser,
  shared: Shared,
  work: (engineer: SheetPage, colleague: SheetPage) => Promise<void>,
): Promise<void> => {
  const [engineer, colleague] = await Promise.all([
    openShared(office, browser, 'engineer', shared),
    openShared(office, browser, 'colleague', shared),
  ])
  try {
    await work(engineer, colleague)
    expectNoFaults(engineer, colleague)
  } finally {
    office.joinFor('engineer')
    office.joinFor('colleague')
    await engineer.close()
    await colleague.close()
  }
}

export const occurrences = (text: string, word: string): number => text.split(word).length - 1
