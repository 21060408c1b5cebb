const UINT32 = 2 ** 32

/** Numbers that look thrown but come from a text: the demo tells the same of a circuit at every load. */
export class Seeded {
  private state: number

  constructor(text: string) {
    this.state = 2166136261 // offset and prime of the 32-bit FNV-1a hash
    for (const character of text) this.state = Math.imul(this.state ^ (character.codePointAt(0) ?? 0), 16777619) >>> 0
  }

  /** @returns from low, up to and without high */
  between(low: number, high: number): number {
    return low + (high - low) * this.next()
  }

  /** @returns a whole number, low and high included */
  whole(low: number, high: number): number {
    return Math.floor(this.between(low, high + 1))
  }

  /** A step of mulberry32. @returns from 0, up to and without 1 */
  private next(): number {
    this.state = (this.state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(this.state ^ (this.state >>> 15), this.state | 1)
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)
    return ((mixed ^ (mixed >>> 14)) >>> 0) / UINT32
  }
}
