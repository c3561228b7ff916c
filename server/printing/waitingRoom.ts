/** So many at once, so many waiting; who comes then is told to come later. */
export interface WaitingRoom {
  /** @returns undefined where too many wait already */
  enter<T>(work: () => Promise<T>): Promise<T> | undefined
}

export const createWaitingRoom = (atOnce: number, mostWaiting: number): WaitingRoom => {
  let working = 0
  const waiting: (() => void)[] = []
  const leave = () => {
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
    enter: (work) => {
      if (working >= atOnce && waiting.length >= mostWaiting) return undefined
      return takeTurn().then(work).finally(leave)
    },
  }
}
