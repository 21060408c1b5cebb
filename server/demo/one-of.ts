/** A word of the demo's data as one of the words allowed. @throws Error where the data has a slip */
export function oneOf<Word extends string>(allowed: readonly Word[], text: string): Word {
  const word = allowed.find((each) => each === text)
  if (word === undefined) throw new Error(`The demo's data says "${text}"; it may be one of ${allowed.join(', ')}.`)
  return word
}
