/** Every name and spelling of the unit list, found by what was typed. */
import { catalogue, compounds, prefixes, type ListedUnit } from './catalogue'

export interface Unit {
  name: string
  spoken: string
  dimension: ListedUnit['dimension']
  value: number
  tens: number
  zero?: number
  /** Turns: rev, rpm, Hz. */
  countsTurns: boolean
  /** rad and deg. */
  namesAngle: boolean
}

const byName = new Map<string, Unit>()
const bySpelling = new Map<string, readonly Unit[]>()

const enter = (listed: ListedUnit, prefix: string): void => {
  const multiple = prefixes[prefix]
  const unit: Unit = {
    name: prefix + listed.name,
    spoken: (multiple?.spoken ?? '') + listed.spoken,
    dimension: listed.dimension,
    value: listed.value,
    tens: (listed.tens ?? 0) + (multiple?.tens ?? 0),
    countsTurns: listed.dimension[7] !== 0,
    namesAngle: listed.name === 'rad' || listed.name === 'deg',
    ...(listed.zero === undefined ? {} : { zero: listed.zero }),
  }
  byName.set(unit.name, unit)
  bySpelling.set(unit.name, [unit])
  if (prefix === '') for (const spelling of listed.spellings ?? []) bySpelling.set(spelling, [unit])
}

for (const listed of catalogue) {
  enter(listed, '')
  for (const prefix of listed.prefixes ?? []) enter(listed, prefix)
}
for (const [spelling, names] of Object.entries(compounds)) {
  bySpelling.set(
    spelling,
    names.flatMap((name) => byName.get(name) ?? []),
  )
}

/** The unit of this listed name; a phrase holds no other names. */
export const unitNamed = (name: string): Unit => {
  const unit = byName.get(name)
  if (unit === undefined) throw new Error(`The unit list has no ${name}.`)
  return unit
}

/** `µ`, `μ` are typed for the prefix u, `Ω` for ohm. */
const asListed = (spelling: string): string =>
  spelling.replace(/[\u00b5\u03bc]/g, 'u').replace(/[\u2126\u03a9]/g, 'ohm')

/** The unit, or the units of a compound such as `kNm`, behind a spelling; undefined where it is none. */
export const unitsSpelled = (spelling: string): readonly Unit[] | undefined =>
  bySpelling.get(spelling) ?? (spelling.charCodeAt(0) > 127 ? bySpelling.get(asListed(spelling)) : undefined)

export const isUnitName = (spelling: string): boolean => unitsSpelled(spelling) !== undefined

export const unitSpellings = (): string[] => [...bySpelling.keys()]
