const pens = ['plum', 'petrol', 'olive', 'walnut', 'violet', 'rose'] as const

/** The palette's colour for a colleague's pen; colours repeat, so initials always stand beside it. */
export const penColour = (pen: number): string => `var(--pen-${pens[pen % pens.length] ?? 'plum'})`
