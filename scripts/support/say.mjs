/** An end that a person can do something about: its message is one or a few plain sentences, shown without a stack. */
export class Stop extends Error {}

export function say(text) {
  console.log(text)
}

const SYSTEM_ERRORS = {
  ENOSPC: (error) => `The disk is full: nothing more can be written${at(error)}. Free some space and start again.`,
  EDQUOT: (error) => `Your share of the disk is used up: nothing more can be written${at(error)}. Free some space and start again.`,
  EACCES: (error) => `This user may not read or write${at(error)}. Start as the user that owns it, or change its owner.`,
  EPERM: (error) => `This user may not change${at(error)}. Start as the user that owns it, or change its owner.`,
  EROFS: (error) => `The disk can only be read: nothing can be written${at(error)}.`,
}

const at = (error) => (error.path ? ` (${error.path})` : '')

/** Sentences for what is expected to go wrong; the whole stack for a mistake of ours. */
export function sentenceOf(error) {
  if (error instanceof Stop) return error.message
  const write = SYSTEM_ERRORS[error?.code]
  return write ? write(error) : `Something unexpected went wrong.\n${error?.stack ?? error}`
}
