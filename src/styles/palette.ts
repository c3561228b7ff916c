/**
 * The palette of tokens.css as values, for those who need numbers rather than names: Vuetify's theme and
 * the test of contrasts. Read from the style sheet itself, so that a colour is written once.
 */
export type Appearance = 'light' | 'night'

/** Names without their dashes (`ink-2`), values as `#rrggbb`. */
export type Palette = Record<string, string>

const block = (css: string, selector: string): Palette => {
  const start = css.indexOf(`${selector} {`)
  const body = css.slice(start, css.indexOf('\n}', start))
  return Object.fromEntries(
    [...body.matchAll(/--([\w-]+):\s*(#[0-9a-f]{6});/g)].map(([, name, hex]) => [name, hex]),
  )
}

/** Both palettes of a style sheet; night keeps what it does not replace. */
export const readPalettes = (css: string): Record<Appearance, Palette> => {
  const light = block(css, ':root')
  return { light, night: { ...light, ...block(css, ":root[data-appearance='night']") } }
}
