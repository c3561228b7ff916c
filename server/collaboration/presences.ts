/**
 * Who is here and where, of one document in this process. A client says where it is; who it is, the
 * server writes over what it said. Presence does not cross between processes: colleagues on another one
 * see each other's edits and pens, not each other's carets.
 */
import * as decoding from 'lib0/decoding'
import * as encoding from 'lib0/encoding'
import {
  Awareness,
  applyAwarenessUpdate,
  encodeAwarenessUpdate,
  removeAwarenessStates,
} from 'y-protocols/awareness'
import * as Y from 'yjs'
import { awarenessFrame, limits, saidPresenceSchema, type PersonHere } from '@shared/protocol'
import type { Member } from './member'

/** Rewrites an awareness update: the person's own clients only, stamped with who the person is. */
const stamped = (
  update: Uint8Array,
  person: PersonHere,
  isOwn: (clientId: number) => boolean,
): Uint8Array => {
  const decoder = decoding.createDecoder(update)
  const encoder = encoding.createEncoder()
  const count = decoding.readVarUint(decoder)
  const kept: (() => void)[] = []
  for (let index = 0; index < count; index++) {
    const clientId = decoding.readVarUint(decoder)
    const clock = decoding.readVarUint(decoder)
    const said = decoding.readVarString(decoder)
    if (!isOwn(clientId)) continue
    if (said.length > limits.presenceBytes) throw new Error('presence too large')
    const state: unknown = JSON.parse(said)
    const presence = state === null ? null : { ...saidPresenceSchema.parse(state), user: person }
    kept.push(() => {
      encoding.writeVarUint(encoder, clientId)
      encoding.writeVarUint(encoder, clock)
      encoding.writeVarString(encoder, JSON.stringify(presence))
    })
  }
  encoding.writeVarUint(encoder, kept.length)
  for (const write of kept) write()
  return encoding.toUint8Array(encoder)
}

export class Presences {
  /** Awareness wants a document; it is never written. */
  readonly #bearer = new Y.Doc()
  readonly #awareness = new Awareness(this.#bearer)
  readonly #owners = new Map<number, Member>()

  constructor() {
    this.#awareness.setLocalState(null)
  }

  /**
   * Takes what a member says and gives the frame for everybody, the sender too: hearing its own presence
   * is how a client knows that the connection lives.
   * @throws on rubbish
   */
  hear(member: Member, update: Uint8Array): Uint8Array {
    const isOwn = (clientId: number): boolean => {
      const owner = this.#owners.get(clientId)
      if (owner !== undefined && owner !== member && owner.accountId !== member.accountId) return false
      if (owner !== member && this.#ownedBy(member).length >= limits.presencesPerSocket) return false
      this.#owners.set(clientId, member)
      return true
    }
    const own = stamped(update, member.person, isOwn)
    applyAwarenessUpdate(this.#awareness, own, member)
    return awarenessFrame(own)
  }

  #ownedBy(member: Member): number[] {
    return [...this.#owners].filter(([, owner]) => owner === member).map(([clientId]) => clientId)
  }

  /** Everybody who is here, for who comes in; undefined where nobody is. */
  everybody(): Uint8Array | undefined {
    const clients = [...this.#awareness.getStates().keys()]
    return clients.length === 0 ? undefined : awarenessFrame(encodeAwarenessUpdate(this.#awareness, clients))
  }

  /** Frame that tells the others that this member has left; undefined where it never said it was here. */
  leave(member: Member): Uint8Array | undefined {
    const clients = this.#ownedBy(member)
    for (const client of clients) this.#owners.delete(client)
    const here = clients.filter((client) => this.#awareness.getStates().has(client))
    if (here.length === 0) return undefined
    removeAwarenessStates(this.#awareness, here, member)
    return awarenessFrame(encodeAwarenessUpdate(this.#awareness, here))
  }

  end(): void {
    // Ends the awareness and its timer, too.
    this.#bearer.destroy()
  }
}
