const LEAST_CHARACTERS = 8 // advised are 15
const MOST_BYTES = 72 // bcrypt reads no more

/** The key of the sentence that says what is wrong with a new password; null if nothing is. */
export function passwordFault(password: string): 'account.password.tooShort' | 'account.password.tooLong' | null {
  if ([...password].length < LEAST_CHARACTERS) return 'account.password.tooShort'
  return new TextEncoder().encode(password).length > MOST_BYTES ? 'account.password.tooLong' : null
}
