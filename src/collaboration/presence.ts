/** The people in a sheet, as the server's stamped presences say. */
import type { Awareness } from 'y-protocols/awareness'
import { presenceSchema } from '@shared/protocol'
import type { PersonInSheet } from './contracts'

export type { PersonInSheet }

/** One entry for each open page; the list has this page first. */
export const peopleOf = (awareness: Awareness): PersonInSheet[] => {
  const people: PersonInSheet[] = []
  for (const [clientId, state] of awareness.getStates()) {
    const presence = presenceSchema.safeParse(state)
    if (!presence.success) continue
    const { user, where } = presence.data
    const isMe = clientId === awareness.clientID
    people.push({ ...user, clientId, isMe, ...(where === undefined ? {} : { where }) })
  }
  return people.sort((a, b) => Number(b.isMe) - Number(a.isMe) || a.name.localeCompare(b.name))
}
