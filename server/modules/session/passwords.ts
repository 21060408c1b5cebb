import bcrypt from 'bcryptjs'
import { badField } from '../../problem'
import { COMMON_PASSWORDS } from './common-passwords'

const COST = 12 // OWASP ASVS 5; one check takes about a quarter of a second
const TEST_COST = 4 // bcrypt's least, so that tests do not spend their time hashing
const LEAST_CHARACTERS = 8
const MOST_BYTES = 72 // bcrypt reads no further, so longer is refused and not cut silently

const cost = (): number => (process.env.WEIGHBACK_MODE === 'test' ? TEST_COST : COST)
/** Compared where no account has the address, so that both answers take the same time. */
const decoy = bcrypt.hashSync('no account has this password', cost())

/** @throws Problem bad-input naming `field` if the password is too short, too long or among the commonest */
export function checkPassword(password: string, field: string): void {
  if ([...password].length < LEAST_CHARACTERS) throw badField(field, 'passwordShort', { least: LEAST_CHARACTERS })
  if (Buffer.byteLength(password) > MOST_BYTES) throw badField(field, 'passwordLong', { most: MOST_BYTES })
  if (COMMON_PASSWORDS.has(password.toLowerCase())) throw badField(field, 'passwordCommon')
}

export const hashPassword = (password: string): Promise<string> => bcrypt.hash(password, cost())

/** Whether the password fits; takes the same time whether or not there is a hash. */
export async function passwordFits(password: string, hash: string | null): Promise<boolean> {
  if (Buffer.byteLength(password) > MOST_BYTES) return false
  const fits = await bcrypt.compare(password, hash ?? decoy)
  return hash !== null && fits
}
