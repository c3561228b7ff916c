/**
 * A unit, as typed (`N/mm2`, `kg m^2`, `kNm`): set upright, exponents raised, a dot between the units of
 * a product (ISO 80000-1, 7.2.2). Text that is no unit is set all the same: it may be one in the making.
 */
import type { MathNode } from '../contracts'
import { operator, row, upright } from './drawn'
import { lower } from './number'
import { uprightTex } from './safe'
import { spokenUnitName } from './unitNames'

export interface DrawnUnit {
  tex: string
  print: MathNode
  speech: string
}

type Token = { name: string; exponent: string } | '·' | '/' | '(' | ')'

/** Spelled for want of a key on the keyboard: set as the sign that is meant. */
const signs: Record<string, string> = { degC: '°C', degF: '°F', '\u00b5': 'µ' }

const pattern =
  /\s*(?:([()])|(\/|÷)|([*·×⋅])|([^\s()/÷*·×⋅^⁻⁰¹²³⁴⁵⁶⁷⁸⁹\d][^\s()/÷*·×⋅^⁻⁰¹²³⁴⁵⁶⁷⁸⁹\d]*|\d+)(?:\^?([-−]?\d+)|\^\(([-−]?\d+)\)|([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+))?|(.))/gu

const tokens = (text: string): Token[] => {
  const found: Token[] = []
  for (const match of text.trim().matchAll(pattern)) {
    const [, bracket, slash, dot, name, plain, bracketed, raised, other] = match
    if (bracket === '(' || bracket === ')') found.push(bracket)
    else if (slash !== undefined) found.push('/')
    else if (dot !== undefined) found.push('·')
    else {
      const previous = found.at(-1)
      if (previous !== undefined && (typeof previous === 'object' || previous === ')')) found.push('·')
      const exponent = lower(plain ?? bracketed ?? raised ?? '').replace('−', '-')
      found.push({ name: name ?? other ?? '', exponent })
    }
  }
  return found
}

const exponentNode = (exponent: string): MathNode =>
  exponent.startsWith('-')
    ? row(operator('−'), { math: 'number', text: exponent.slice(1) })
    : { math: 'number', text: exponent }

const tokenTex = (token: Token): string => {
  if (token === '·') return '{\\cdot}'
  if (typeof token === 'string') return token
  const name = uprightTex(Object.hasOwn(signs, token.name) ? (signs[token.name] ?? '') : token.name)
  return token.exponent === '' ? name : `${name}^{${token.exponent}}`
}

const tokenNode = (token: Token): MathNode => {
  if (typeof token === 'string') return token === '·' ? operator('·') : upright(token)
  const name = upright(Object.hasOwn(signs, token.name) ? (signs[token.name] ?? '') : token.name)
  return token.exponent === '' ? name : { math: 'script', base: name, sup: exponentNode(token.exponent) }
}

const spokenFactor = ({ name, exponent }: { name: string; exponent: string }): string => {
  const said = spokenUnitName(name)
  const isLength = /metre$|^inch$|^foot$|^yard$/.test(said)
  if (exponent === '2') return isLength ? `square ${said}` : `${said} squared`
  if (exponent === '3') return isLength ? `cubic ${said}` : `${said} cubed`
  return exponent === '' ? said : `${said} to the power ${exponent.replace('-', 'minus ')}`
}

const spoken = (token: Token): string => {
  if (token === '/') return 'per'
  return typeof token === 'string' ? '' : spokenFactor(token)
}

/** @param text a unit as typed; never empty. */
export const drawUnit = (text: string): DrawnUnit => {
  const read = tokens(text)
  return {
    tex: read.map(tokenTex).join(''),
    print: row(...read.map(tokenNode)),
    speech: read
      .map(spoken)
      .filter((word) => word !== '')
      .join(' '),
  }
}
