/** So much at once, and so much more every second; what is not used does not add up beyond *at once*. */
export interface Allowance {
  /** @returns false where less than `amount` is left; then nothing more should be taken from that sender */
  take(amount: number): boolean
}

export const allowance = (atOnce: number, perSecond: number): Allowance => {
  let left = atOnce
  let countedAt = Date.now()
  return {
    take: (amount) => {
      const now = Date.now()
      left = Math.min(atOnce, left + ((now - countedAt) / 1000) * perSecond) - amount
      countedAt = now
      return left >= 0
    },
  }
}
