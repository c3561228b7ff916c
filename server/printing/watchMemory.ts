/** Watches what a process really occupies: Typst's memory is outside of the JavaScript heap. */
import { readFile } from 'node:fs/promises'

const residentMb = async (pid: number): Promise<number> => {
  const status = await readFile(`/proc/${pid}/status`, 'utf8')
  return Number(/^VmRSS:\s+(\d+) kB/m.exec(status)?.[1] ?? 0) / 1024
}

/** Calls `exceeded` once when process `pid` occupies more than `mostMb`; where the system keeps no such count, never. */
export const watchMemory = (pid: number, mostMb: number, exceeded: () => void): { stop(): void } => {
  const timer = setInterval(() => {
    residentMb(pid).then(
      (resident) => {
        if (resident <= mostMb) return
        clearInterval(timer)
        exceeded()
      },
      () => clearInterval(timer),
    )
  }, 100)
  return { stop: () => clearInterval(timer) }
}
