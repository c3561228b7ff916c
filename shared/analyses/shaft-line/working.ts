/** The steps of the solution, printed like formulas. Row names stand as indices: J_1, tau_2, T_ext_1. */
import type { WorkingStep } from '../../engine/contracts'
import * as q from '../../mechanics/quantities'
import { of, step } from '../../mechanics/working'
import type { Equilibrium } from './equilibrium'
import { isSamePlace } from './line'
import type { Line, Piece, Segment } from './line'
import type { Step } from './steps'

type Values = WorkingStep['values']

/** A sum with more terms than this is described, not written out. */
const LONGEST_SUM = 10

const modulusSymbol = (segment: Segment): string => (segment.hasOwnModulus ? `G_${segment.name}` : 'G')
const modulusOf = (segment: Segment): Values => ({ [modulusSymbol(segment)]: of(q.modulus, segment.G) })
const applied = (line: Line, upTo: number) =>
  line.torques.filter(({ x }) => x < upTo && !isSamePlace(line, x, upTo))

export const workingOf = (
  line: Line,
  pieces: readonly Piece[],
  balance: Equilibrium,
  steps: readonly Step[],
  outputs: Record<string, number>,
): WorkingStep[] => [
  ...line.segments.flatMap(sectionSteps),
  ...reactionSteps(line, balance),
  ...line.segments.flatMap((segment) => torqueAndStress(line, pieces, balance, segment)),
  ...steps.flatMap(peakSteps),
  ...twistSteps(line, pieces, balance),
  stiffnessStep(line, outputs['k_t'] ?? NaN),
]

/** Torsion constant and flexibility of a segment. */
const sectionSteps = (segment: Segment): WorkingStep[] => {
  const { name, round } = segment
  const J = `J_${name}`
  const c = `c_${name}`
  const own = round
    ? step(J, q.secondMoment, segment.J, {
        expression: round.bore > 0 ? `pi/32*(d_${name}^4 - d_i_${name}^4)` : `pi/32*d_${name}^4`,
        values: {
          [`d_${name}`]: of(q.length, round.outer),
          ...(round.bore > 0 ? { [`d_i_${name}`]: of(q.length, round.bore) } : {}),
        },
        source: 'Timoshenko & Goodier',
        clause: 'section 104',
      })
    : step(J, q.secondMoment, segment.J, { note: `from section ${segment.section ?? ''}` })
  const flexibility = step(c, q.torsionalFlexibility, segment.length / (segment.G * segment.J), {
    expression: `L_${name}/(${modulusSymbol(segment)}*${J})`,
    values: {
      [`L_${name}`]: of(q.length, segment.length),
      ...modulusOf(segment),
      [J]: of(q.secondMoment, segment.J),
    },
    note: 'twist per torque of the segment',
  })
  return [own, flexibility]
}

const flexibilityOf = (segment: Segment) => segment.length / (segment.G * segment.J)

/** Flexibility from the start to a station, written out where it is short. */
const flexibilityTo = (line: Line, x: number): { terms: string[]; values: Values; value: number } => {
  const terms: string[] = []
  const values: Values = {}
  let value = 0
  for (const segment of line.segments) {
    if (x < segment.from || isSamePlace(line, x, segment.from)) break
    const c = `c_${segment.name}`
    const isWhole = x > segment.to || isSamePlace(line, x, segment.to)
    const share = isWhole ? 1 : (x - segment.from) / segment.length
    value += share * flexibilityOf(segment)
    values[c] = of(q.torsionalFlexibility, flexibilityOf(segment))
    if (isWhole) terms.push(c)
    else {
      values['x'] = of(q.length, x)
      values[`L_${segment.name}`] = of(q.length, segment.length)
      if (segment.from > 0) values['x_0'] = of(q.length, segment.from)
      terms.push(`${segment.from > 0 ? '(x - x_0)' : 'x'}/L_${segment.name}*${c}`)
    }
  }
  return { terms, values, value }
}

const written = (terms: readonly string[]): { expression?: string } =>
  terms.length > 0 && terms.length <= LONGEST_SUM ? { expression: terms.join(' + ') } : {}

const reactionSteps = (line: Line, balance: Equilibrium): WorkingStep[] => {
  const { start, end } = balance.reactions
  const torqueValues: Values = Object.fromEntries(
    line.torques.map(({ name, torque }) => [`T_ext_${name}`, of(q.torque, torque)]),
  )
  const isShort = line.torques.length <= LONGEST_SUM
  const total = line.torques.map(({ name }) => `T_ext_${name}`).join(' + ')
  const note = 'equilibrium of the whole line'
  if (start !== undefined && end !== undefined) {
    const flexibilities = line.torques.map(({ name, x }) => ({ name, ...flexibilityTo(line, x) }))
    const whole = flexibilityTo(line, line.length)
    const weighted = flexibilities.flatMap(({ name, value }) =>
      value === 0 ? [] : [`T_ext_${name}*c_x${name}`],
    )
    return [
      ...flexibilities
        .filter(({ value }) => value !== 0)
        .map(({ name, terms, values, value }) =>
          step(`c_x${name}`, q.torsionalFlexibility, value, {
            ...written(terms),
            values,
            note: `flexibility from the start to torque ${name}`,
          }),
        ),
      step('c_L', q.torsionalFlexibility, whole.value, {
        ...written(whole.terms),
        values: whole.values,
        note: 'flexibility of the whole line',
      }),
      step('T_end', q.torque, end, {
        ...(isShort && weighted.length > 0 ? { expression: `-(${weighted.join(' + ')})/c_L` } : {}),
        values: {
          ...torqueValues,
          ...Object.fromEntries(
            flexibilities.map(({ name, value }) => [`c_x${name}`, of(q.torsionalFlexibility, value)]),
          ),
          c_L: of(q.torsionalFlexibility, whole.value),
        },
        note: 'compatibility: the end does not turn',
        source: 'Gere & Timoshenko, statically indeterminate bars in torsion',
      }),
      step('T_start', q.torque, start, {
        ...(isShort ? { expression: `-(${total} + T_end)` } : {}),
        values: { ...torqueValues, T_end: of(q.torque, end) },
        note,
      }),
    ]
  }
  const [symbol, value] = start !== undefined ? ['T_start', start] : ['T_end', end]
  if (value === undefined) return []
  return [
    step(symbol, q.torque, value, {
      ...(isShort ? { expression: `-(${total})` } : {}),
      values: torqueValues,
      note,
    }),
  ]
}

/** Internal torque that governs a segment, and the nominal stress from it. */
const torqueAndStress = (
  line: Line,
  pieces: readonly Piece[],
  balance: Equilibrium,
  segment: Segment,
): WorkingStep[] => {
  const { name, round } = segment
  const governing = pieces.reduce(
    (best, piece, i) =>
      piece.segment === segment && Math.abs(balance.torques[i] ?? 0) > Math.abs(balance.torques[best] ?? -1)
        ? i
        : best,
    pieces.findIndex((piece) => piece.segment === segment),
  )
  const torque = balance.torques[governing] ?? 0
  const before = applied(line, pieces[governing]?.to ?? 0)
  const { start } = balance.reactions
  const terms = [...(start === undefined ? [] : ['T_start']), ...before.map((one) => `T_ext_${one.name}`)]
  const T = `T_${name}`
  const W_t = round
    ? {
        expression: `abs(${T})*d_${name}/(2*J_${name})`,
        values: { [`d_${name}`]: of(q.length, round.outer), [`J_${name}`]: of(q.secondMoment, segment.J) },
      }
    : { expression: `abs(${T})/W_${name}`, values: { [`W_${name}`]: of(q.sectionModulus, segment.W_t) } }
  return [
    step(T, q.torque, torque, {
      ...(terms.length > 0 && terms.length <= LONGEST_SUM ? { expression: `-(${terms.join(' + ')})` } : {}),
      values: {
        ...(start === undefined ? {} : { T_start: of(q.torque, start) }),
        ...Object.fromEntries(before.map((one) => [`T_ext_${one.name}`, of(q.torque, one.torque)])),
      },
      note: 'greatest internal torque of the segment, from equilibrium of the part before it',
    }),
    step(`tau_${name}`, q.stress, Math.abs(torque) / segment.W_t, {
      expression: W_t.expression,
      values: { [T]: of(q.torque, torque), ...W_t.values },
      note: 'nominal',
    }),
  ]
}

const peakSteps = (at: Step): WorkingStep[] => {
  const { name } = at.before
  const thin = at.thinner.name
  return [
    step(`K_ts_${name}`, q.ratio, at.factor, {
      note: `fillet at the step after segment ${name}, nominal stress of the smaller diameter`,
      source: at.source,
    }),
    step(`tau_peak_${name}`, q.stress, at.peak, {
      expression: `K_ts_${name}*abs(T_s${name})*d_${thin}/(2*J_${thin})`,
      values: {
        [`K_ts_${name}`]: of(q.ratio, at.factor),
        [`T_s${name}`]: of(q.torque, at.torque),
        [`d_${thin}`]: of(q.length, at.smaller),
        [`J_${thin}`]: of(q.secondMoment, at.thinner.J),
      },
      note: `T_s${name}: torque through the thinner side of the step`,
    }),
  ]
}

/** Rotation at the end of each segment, from the one before. */
const twistSteps = (line: Line, pieces: readonly Piece[], balance: Equilibrium): WorkingStep[] => {
  const first = balance.rotations[0] ?? 0
  const start = step('phi_0', q.angle, first, {
    note: line.isFixed.start
      ? 'the start is fixed'
      : line.isFixed.end
        ? 'rotation of the start, so that the fixed end does not turn'
        : 'both ends are free: rotations are counted from the start',
  })
  let before = 'phi_0'
  const ends = line.segments.map((segment) => {
    const own = pieces.flatMap((piece, i) =>
      piece.segment === segment ? [{ piece, torque: balance.torques[i] ?? 0 }] : [],
    )
    const values: Values = { ...modulusOf(segment), [`J_${segment.name}`]: of(q.secondMoment, segment.J) }
    const from = pieces.findIndex((piece) => piece.segment === segment)
    values[before] = of(q.angle, balance.rotations[from] ?? 0)
    const terms = own.map(({ piece, torque }, i) => {
      const part = own.length === 1 ? segment.name : `${segment.name}${String.fromCharCode(97 + (i % 26))}`
      values[`T_${part}`] = of(q.torque, torque)
      values[`L_${part}`] = of(q.length, piece.to - piece.from)
      return `T_${part}*L_${part}`
    })
    const twist = terms.length === 1 ? (terms[0] ?? '') : `(${terms.join(' + ')})`
    const symbol = `phi_${segment.name}`
    const made = step(symbol, q.angle, balance.rotations[from + own.length] ?? 0, {
      ...(terms.length <= LONGEST_SUM
        ? { expression: `${before} + ${twist}/(${modulusSymbol(segment)}*J_${segment.name})` }
        : {}),
      values,
      note: `rotation at the end of segment ${segment.name}`,
    })
    before = symbol
    return made
  })
  return [start, ...ends]
}

const stiffnessStep = (line: Line, k_t: number): WorkingStep => {
  const terms = line.segments.map(({ name }) => `c_${name}`)
  return step('k_t', q.torsionalStiffness, k_t, {
    ...(terms.length <= LONGEST_SUM ? { expression: `1/(${terms.join(' + ')})` } : {}),
    values: Object.fromEntries(
      line.segments.map((segment) => [
        `c_${segment.name}`,
        of(q.torsionalFlexibility, flexibilityOf(segment)),
      ]),
    ),
    note: 'torque at one end per rotation against the other',
  })
}
