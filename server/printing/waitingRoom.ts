/** So many at once, so many waiting, of whom nobody takes all places; who comes then is told to come later. */
export interface WaitingRoom {
  /** @returns undefined where too many wait already, or `who` has as many places as one may have */
  enter<T>(who: string, work: () => Promise<T>): Promise<T> | undefined
}

export const createWaitingRoom = (atOnce: number, mostWaiting: number, mostEach: number): WaitingRoom => {
  let working = 0
  const places = new Map<string, number>()
  const waiting: (() => void)[] = []
  const leave = (who: string) => {
    const left = (places.get(who) ?? 1) - 1
    if (left > 0) places.set(who, left)
    else places.delete(who)
    const next = waiting.shift()
    if (next) next()
    else working--
  }
  const takeTurn = async (): Promise<void> => {
    if (working < atOnce) {
      working++
      return
    }
    await new Promise<void>((resolve) => waiting.push(resolve))
  }
  return {
    enter: (who, work) => {
      const taken = places.get(who) ?? 0
      if (taken >= mostEach || (working >= atOnce && waiting.length >= mostWaiting)) return undefined
      places.set(who, taken + 1)
      return takeTurn()
        .then(work)
        .finally(() => leave(who))
    },
  }
}
