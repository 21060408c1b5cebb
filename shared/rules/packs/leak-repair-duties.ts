import type { PlainDate } from '../../dates/plain-date'
import { lb } from '../../mass/mass'
import { dated, type Basis } from '../dated'
import type { Due, DutyRule } from '../pack'
import { CHECKED_ON } from './checked-on'

const LARGE_CHARGE = lb('500') // from here on commercial and industrial appliances are inspected every quarter
const QUARTERLY_CATEGORIES = ['commercial', 'industrial-process'] as const
const YEARLY_CATEGORIES = ['comfort-cooling', 'other'] as const

/**
 * The duties of a leak repair rule in the shape that 40 CFR 82.157(d)-(j) and 84.106 share. Each citation
 * is the section's own paragraph.
 */
export function leakRepairDuties(section: string, from: PlainDate, basis: Basis): DutyRule[] {
  const due = (name: string, paragraph: string, value: Due) =>
    dated({ name, values: [{ from, value, source: { cite: `${section}${paragraph}`, basis }, checkedOn: CHECKED_ON }] })
  return [
    { code: 'leak-repair', trigger: 'above-threshold', due: due('leak-repair', '(d)', { days: 30, withProcessShutdownDays: 120 }) },
    { code: 'initial-test', trigger: 'above-threshold', due: due('initial-test', '(e)', { days: 30, withProcessShutdownDays: 120 }) },
    { code: 'follow-up-test', trigger: 'initial-test-passed', due: due('follow-up-test', '(e)', { days: 10 }) },
    { code: 'plan', trigger: 'follow-up-failed', due: due('plan', '(h)', { days: 30 }) },
    { code: 'plan-completion', trigger: 'plan-made', due: due('plan-completion', '(h)', { years: 1 }) },
    {
      code: 'inspection-quarterly', trigger: 'above-threshold', due: due('inspection-quarterly', '(g)', { schedule: 'quarterly' }),
      categories: QUARTERLY_CATEGORIES, leastChargeKg: LARGE_CHARGE,
    },
    {
      code: 'inspection-yearly', trigger: 'above-threshold', due: due('inspection-yearly', '(g)', { schedule: 'calendar-year' }),
      categories: QUARTERLY_CATEGORIES, belowChargeKg: LARGE_CHARGE,
    },
    {
      code: 'inspection-yearly', trigger: 'above-threshold', due: due('inspection-yearly', '(g)', { schedule: 'calendar-year' }),
      categories: YEARLY_CATEGORIES,
    },
    { code: 'chronic-leak-report', trigger: 'chronic-leak', due: due('chronic-leak-report', '(j)', { on: { month: 3, day: 1 } }) },
  ]
}
