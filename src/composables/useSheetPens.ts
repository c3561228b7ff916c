import type { LineId } from '@shared/errors/problem'
import type { SheetConnection } from '@/collaboration/sheetConnection'
import { penColour } from '@/editor/penColour'
import type { PenHolder } from '@/editor/desk'

export interface SheetPens {
  holder: (key: string) => PenHolder | undefined
  /** Carries out an act with the pens of all the lines it writes in, or says who stands in the way. */
  withPens: (keys: LineId[], act: () => void) => Promise<boolean>
}

/** Acts on several lines take all pens or none. */
export const useSheetPens = (connection: SheetConnection, say: (text: string) => void): SheetPens => {
  const holder = (key: string): PenHolder | undefined => {
    const person = connection.pens.holderOf(key)
    return (
      person && {
        name: person.name,
        initials: person.initials,
        colour: penColour(person.pen),
        isMine: connection.pens.isMine(key),
      }
    )
  }

  const refusal = (keys: LineId[]): string => {
    const other = keys.map(holder).find((person) => person && !person.isMine)
    if (other) return `${other.name} is writing there. Try again in a minute.`
    return 'The connection is lost: lines can be changed again when it is back.'
  }

  const withPens = async (keys: LineId[], act: () => void): Promise<boolean> => {
    const kept = keys.filter((key) => connection.pens.isMine(key))
    if (keys.length > 0 && !(await connection.pens.take(keys))) {
      say(refusal(keys))
      return false
    }
    act()
    connection.pens.release(keys.filter((key) => !kept.includes(key)))
    return true
  }

  return { holder, withPens }
}
