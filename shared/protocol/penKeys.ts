/** What a pen is for: a line, by its id, or one of the front texts. */
export const frontTexts = ['purpose', 'method', 'conclusion'] as const
export type FrontText = (typeof frontTexts)[number]

export const penOfLine = (lineId: string): string => lineId
/** `front:` cannot begin the id of a line, which has no colon. */
export const penOfFront = (field: string): string => `front:${field}`

export const penKeyPattern = /^(front:[A-Za-z]{1,40}|[A-Za-z0-9_-]{1,64})$/
