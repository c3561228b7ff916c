import { onScopeDispose } from 'vue'

/**
 * Gathers calls into one a frame. A hidden window draws no frames: there a timer does it, or a sheet in
 * a background tab would stop computing.
 */
export const useFrame = (act: () => void) => {
  let frame = 0
  let timer: ReturnType<typeof setTimeout> | undefined

  const cancel = (): void => {
    if (typeof cancelAnimationFrame === 'function') cancelAnimationFrame(frame)
    clearTimeout(timer)
    timer = undefined
  }
  const run = (): void => {
    cancel()
    act()
  }
  const request = (): void => {
    if (timer !== undefined) return
    if (typeof requestAnimationFrame === 'function') frame = requestAnimationFrame(run)
    timer = setTimeout(run, 100)
  }
  onScopeDispose(cancel)
  return { request, runNow: run }
}
