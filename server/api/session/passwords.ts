import { randomBytes } from 'node:crypto'
import argon2 from 'argon2'

/** OWASP's first choice for argon2id: 19 MiB, two passes, one lane. */
const parameters = { type: argon2.argon2id, memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const

/** Keyboards write one character in different ways; a password typed on another computer must still fit. */
const normal = (password: string) => password.normalize('NFKC')

export const hashPassword = (password: string): Promise<string> => argon2.hash(normal(password), parameters)

let dummy: Promise<string> | undefined
const dummyHash = () => (dummy ??= hashPassword(randomBytes(16).toString('hex')))

/** Takes the same time whether or not there is a hash, so that nobody learns which accounts exist. */
export async function passwordFits(hash: string | null, password: string): Promise<boolean> {
  const fits = await argon2.verify(hash ?? (await dummyHash()), normal(password))
  return fits && hash !== null
}
