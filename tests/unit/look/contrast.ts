/** Relative luminance and contrast of `#rrggbb`. Source: WCAG 2.2, definitions of both terms. */
const channel = (value: number): number =>
  value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4

export const luminance = (hex: string): number => {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((at) =>
    channel(parseInt(hex.slice(at, at + 2), 16) / 255),
  )
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue
}

export const contrast = (one: string, other: string): number => {
  const [dark = 0, light = 0] = [luminance(one), luminance(other)].sort((a, b) => a - b)
  return (light + 0.05) / (dark + 0.05)
}
