import type { Source } from '../rules/dated'

/** How far an appliance is evacuated before it is opened; a code of the language file, `recoveryLevels`. */
export interface RecoveryLevel {
  pressure: 'very-high' | 'high' | 'medium' | 'low'
  /** [lb] smallest full charge of the row, and the one from which the next row holds; null: no limit */
  fromLb: number | null
  belowLb: number | null
  level: { kind: 'vacuum'; inHg: number } | { kind: 'absolute'; mmHg: number }
}

export const RECOVERY_LEVELS_SOURCE: Source = { cite: '40 CFR 82.156(a), table 1, equipment made on or after 15 November 1993', basis: 'memory' }

/** @see 40 CFR 82.156(a), table 1 */
export const RECOVERY_LEVELS: readonly RecoveryLevel[] = [
  { pressure: 'very-high', fromLb: null, belowLb: null, level: { kind: 'vacuum', inHg: 0 } },
  { pressure: 'high', fromLb: null, belowLb: 200, level: { kind: 'vacuum', inHg: 0 } },
  { pressure: 'high', fromLb: 200, belowLb: null, level: { kind: 'vacuum', inHg: 10 } },
  { pressure: 'medium', fromLb: null, belowLb: 200, level: { kind: 'vacuum', inHg: 10 } },
  { pressure: 'medium', fromLb: 200, belowLb: null, level: { kind: 'vacuum', inHg: 15 } },
  { pressure: 'low', fromLb: null, belowLb: null, level: { kind: 'absolute', mmHg: 25 } },
]
