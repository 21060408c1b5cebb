import type { Percent } from '../leak-rate/percent'
import type { Mass } from '../mass/mass'
import type { Category } from './categories'
import type { Dated } from './dated'

export type ByCategory<T> = Readonly<Record<Category, T>>

/** Which refrigerants a pack is about. */
export type RefrigerantScope =
  | { kind: 'ozone-depleting' }
  | { kind: 'hfc-or-substitute'; gwpAbove: Dated<string> }

/** After how long a duty is due, counted from its trigger. */
export type Due =
  | { days: number; withProcessShutdownDays?: number }
  | { years: number }
  | { schedule: 'quarterly' | 'calendar-year' }
  | { on: { month: number; day: number } }

export const DUTY_TRIGGERS = ['above-threshold', 'repaired', 'initial-test-passed', 'follow-up-failed', 'plan-made', 'chronic-leak'] as const
export type DutyTrigger = (typeof DUTY_TRIGGERS)[number]

/** A duty that starts to run on a trigger. Its texts stand under `rules.duties` in the language file by `code`. */
export interface DutyRule {
  code: string
  trigger: DutyTrigger
  due: Dated<Due>
  /** Only for these categories and charges; all where absent. */
  categories?: readonly Category[]
  leastChargeKg?: Mass
  belowChargeKg?: Mass
}

/** The law of one jurisdiction on leaks of one kind of gas, as data. Title and summary stand under `rules.packs` by `id`. */
export interface RulePack {
  id: string
  /** What the pack may be switched on for. */
  jurisdictions: readonly string[]
  scope: {
    refrigerants: RefrigerantScope
    /** [kg] smallest full charge of an appliance that is covered; its first day is the day on which the pack begins */
    leastChargeKg: Dated<Mass>
    /** Whether the residential and light commercial subsector is excepted, which the owner decides. */
    exceptsSubsector: boolean
  }
  threshold: Dated<ByCategory<Percent>>
  duties: readonly DutyRule[]
  /** [% of full charge lost in a calendar year] at which, not only above which, a leak is chronic and reported */
  chronicLoss: Dated<Percent>
  /** [years] how long records are kept */
  retention: Dated<number>
}
