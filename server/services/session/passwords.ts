/** Passwords: argon2id, by the parameters that OWASP's password storage cheat sheet names first. */
import argon2 from 'argon2'
import { Refusal } from '../refusals'
import { commonPasswords } from './commonPasswords'

const parameters = { type: argon2.argon2id, memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const

export const hashPassword = (password: string): Promise<string> => argon2.hash(password, parameters)

let nobodys: Promise<string> | undefined

/** Takes as long where there is no password to compare with: the time must not tell who has an account. */
export const passwordFits = async (hash: string | null | undefined, password: string): Promise<boolean> => {
  nobodys ??= hashPassword('nobody has this password')
  const fits = await argon2.verify(hash ?? (await nobodys), password).catch(() => false)
  return fits && hash !== null && hash !== undefined
}

/** @throws {Refusal} for a password that is among the first a stranger would try */
export const refuseWeak = (password: string, person: { email: string; name: string }, path: string): void => {
  const plain = password.toLowerCase().trim()
  const own = [
    person.email.toLowerCase(),
    person.email.split('@')[0]?.toLowerCase(),
    person.name.toLowerCase(),
  ]
  const isCommon = commonPasswords.has(plain) || new Set(plain).size < 3
  if (isCommon || own.includes(plain))
    throw new Refusal(
      'bad-input',
      'This password is too easy to guess. Choose another, of several words perhaps.',
      [{ path, message: 'This password is too easy to guess.' }],
    )
}
