/** A tolerance behind a number: `+/- q`, `+q/-q`, in the unit of the given, which may be repeated. */

export interface Tolerance {
  plus: string
  minus: string
}

const number = String.raw`(?:\d+(?:[.,]\d+)?|\.\d+)(?:[eE][+-]?\d+)?`
const plusMinus = new RegExp(String.raw`^(?:\+\/-|±|\+-)\s*(${number})\s*(.*)$`, 'su')
const plusAndMinus = new RegExp(
  String.raw`^([+−-])\s*(${number})\s*\/\s*([+−-]?)\s*(${number})\s*(.*)$`,
  'su',
)

/** Where a tolerance begins in what stands behind a number; -1 where none does. */
export const toleranceStart = (text: string): number =>
  text.search(/(?:\+\/-|±|\+-|[+−-]\s*[\d.]+(?:e[+-]?\d+)?\s*\/)/iu)

/** Both sides as distances from the nominal value, so that `+0.2/+0.1` has a negative `minus`. */
export const readTolerance = (text: string, unit: string): Tolerance | undefined => {
  const symmetric = plusMinus.exec(text)
  if (symmetric) {
    const [, size = '', rest = ''] = symmetric
    return rest === '' || rest === unit ? { plus: size, minus: size } : undefined
  }
  const sides = plusAndMinus.exec(text)
  if (!sides) return undefined
  const [, above = '', plus = '', below = '', minus = '', rest = ''] = sides
  if (rest !== '' && rest !== unit) return undefined
  return { plus: above === '+' ? plus : `-${plus}`, minus: below === '+' ? `-${minus}` : minus }
}

export const writeTolerance = ({ plus, minus }: Tolerance): string => {
  if (plus === minus) return ` +/- ${plus}`
  const above = plus.startsWith('-') ? plus : `+${plus}`
  return ` ${above}/${minus.startsWith('-') ? `+${minus.slice(1)}` : `-${minus}`}`
}
