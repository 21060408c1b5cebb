import type { Seeded } from './seeded'

/** The demo company began its ledger so many days ago. */
export const OPENED = 725 // [d]

/** A share of what the threshold allows on that day: 1 is exactly at it. A pair is drawn from. */
type Share = number | readonly [number, number]

/** One thing that happened to a demo circuit. Hours are those of the site's clock. */
export type Step<Amount = number> = { daysAgo: number } & (
  | { do: 'opening' }
  | { do: 'installation' }
  | { do: 'charge'; share?: Amount; pounds?: number; purpose?: 'leak' | 'seasonal' | 'retrofit'; leak?: string; isComplete?: boolean; isOwnGas?: boolean; hour?: number }
  | { do: 'recover'; pounds?: number; purpose: 'repair' | 'seasonal' | 'retirement' | 'retrofit'; isComplete?: boolean; isKept?: boolean }
  | { do: 'lose-all' }
  | { do: 'reverse-last'; reason: string }
  | { do: 'revise'; method: string; fullChargeLb: number; note: string }
  | { do: 'leak'; leak: string; component: string; cause: 'vibration-rub' | 'corrosion' | 'joint' | 'wear'; method: 'bubbles' | 'electronic' | 'ultrasonic'; position: string }
  | { do: 'repair'; leak: string; repair: string }
  | { do: 'verify'; kind: 'initial' | 'follow-up'; leak: string; type: string; showsAll?: boolean }
  | { do: 'mark'; component: string; text: string }
  | { do: 'status'; status: 'mothballed' | 'retired' })

interface Story {
  steps: readonly Step<Share>[]
  /** Small charges at the regular calls between the opening and the first charge below. */
  calls?: { times: number; share: readonly [number, number] }
  /** Every day stands as it is told; else the whole story is drawn out or in a little, for each circuit by another factor. */
  isFixed?: boolean
}

const opening: Step<Share> = { do: 'opening', daysAgo: OPENED }
const charge = (daysAgo: number, share: Share, more: object = {}): Step<Share> => ({ do: 'charge', daysAgo, share, ...more })
const coreLeak = (daysAgo: number): Step<Share>[] => [
  { do: 'leak', daysAgo, leak: 'core', component: 'Service port', cause: 'wear', method: 'electronic', position: 'Valve core, liquid side' },
  { do: 'repair', daysAgo, leak: 'core', repair: 'Core and cap replaced' },
  { do: 'verify', daysAgo, kind: 'initial', leak: 'core', type: 'Standing pressure, nitrogen' },
]
const flareLeak = (daysAgo: number): Step<Share>[] => [
  { do: 'leak', daysAgo, leak: 'flare', component: 'Liquid line joint', cause: 'joint', method: 'bubbles', position: 'Flare nut at the drier' },
  { do: 'repair', daysAgo, leak: 'flare', repair: 'Flare remade, drier replaced' },
  { do: 'verify', daysAgo, kind: 'initial', leak: 'flare', type: 'Standing pressure, nitrogen' },
]
const followUp = (daysAgo: number, leak: string): Step<Share> =>
  ({ do: 'verify', daysAgo, kind: 'follow-up', leak, type: 'Electronic, at normal load', showsAll: true })
const seldom = { times: 3, share: [0.08, 0.3] } as const
const often = { times: 5, share: [0.1, 0.45] } as const
const inRolling = { times: 3, share: [0.03, 0.09] } as const

/** What happened to a circuit, by the name of its story in fixtures/demo/company.json. */
const STORIES: Record<string, Story> = {
  'untouched': { steps: [opening] },
  'quiet': { calls: seldom, steps: [opening, charge(392, [0.06, 0.2]), charge(190, [0.06, 0.2])] },
  'far': { calls: seldom, steps: [opening, charge(440, [0.2, 0.4]), charge(345, [0.15, 0.4]), charge(262, [0.15, 0.35]), charge(168, [0.2, 0.5]), charge(83, [0.2, 0.5])] },
  'near': { calls: seldom, steps: [opening, charge(470, [0.2, 0.4]), charge(345, [0.25, 0.45]), charge(214, [0.4, 0.6]), ...coreLeak(38), charge(38, [0.78, 0.94], { leak: 'core' })] },
  'over': { calls: seldom, steps: [opening, charge(452, [0.3, 0.55]), charge(300, [0.4, 0.6]), charge(151, [0.6, 0.8]), ...flareLeak(16), charge(16, [1.3, 2.4], { leak: 'flare' })] },
  'mended': {
    calls: often,
    steps: [
      opening, charge(372, [0.5, 0.65]), ...flareLeak(290), charge(290, [1.3, 2], { leak: 'flare' }), followUp(281, 'flare'), charge(160, [0.15, 0.35]), charge(66, [0.12, 0.3]),
    ],
  },
  'flat': { calls: seldom, isFixed: true, steps: [opening, charge(305, [0.04, 0.08]), { do: 'lose-all', daysAgo: 3 }] },
  'grouped': {
    calls: often,
    steps: [
      opening, charge(420, 0.4), charge(230, [0.2, 0.3]), ...flareLeak(96), charge(96, 0.4, { leak: 'flare', isComplete: false }), charge(84, 0.4, { leak: 'flare' }), followUp(76, 'flare'),
    ],
  },
  'same-day': { calls: often, steps: [opening, charge(380, 0.4), charge(200, [0.2, 0.4]), charge(45, 0.35, { isComplete: false, hour: 10 }), charge(45, 0.25, { hour: 15 })] },
  'seasonal': {
    calls: often,
    steps: [
      opening, charge(330, [0.2, 0.35]), { do: 'recover', daysAgo: 236, pounds: 12, purpose: 'seasonal', isKept: true },
      { do: 'charge', daysAgo: 61, pounds: 11, purpose: 'seasonal', isOwnGas: true, isComplete: false, hour: 11 }, { do: 'charge', daysAgo: 61, pounds: 3, purpose: 'seasonal', hour: 12 },
    ],
  },
  'reversed': {
    calls: often,
    steps: [
      opening, charge(400, 0.4), charge(260, [0.2, 0.4]), { do: 'charge', daysAgo: 80, pounds: 26 },
      { do: 'reverse-last', daysAgo: 74, reason: 'Weighed on circuit 2, entered on circuit 1' }, charge(68, 0.3),
    ],
  },
  'returned': {
    calls: often,
    steps: [
      opening, charge(350, 0.3), { do: 'recover', daysAgo: 70, pounds: 6, purpose: 'repair', isKept: true }, ...flareLeak(70),
      { do: 'charge', daysAgo: 70, pounds: 5, leak: 'flare', isOwnGas: true, isComplete: false, hour: 14 }, { do: 'charge', daysAgo: 70, pounds: 1.5, leak: 'flare', hour: 15 },
    ],
  },
  'mothballed': { calls: inRolling, steps: [opening, charge(500, 0.2), { do: 'recover', daysAgo: 124, purpose: 'repair', isComplete: true, isKept: true }, { do: 'status', daysAgo: 124, status: 'mothballed' }] },
  'retired': { calls: inRolling, steps: [opening, charge(480, 0.6), charge(300, 0.25), { do: 'recover', daysAgo: 205, purpose: 'retirement', isComplete: true }, { do: 'status', daysAgo: 205, status: 'retired' }] },
  'retrofitted': {
    calls: often, isFixed: true,
    steps: [
      opening, charge(430, [0.6, 0.8]), { do: 'leak', daysAgo: 352, leak: 'evaporator', component: 'Evaporator coil', cause: 'corrosion', method: 'electronic', position: 'Return bends, drain side' },
      charge(352, 1.4, { leak: 'evaporator' }), { do: 'recover', daysAgo: 331, purpose: 'retrofit', isComplete: true }, { do: 'status', daysAgo: 331, status: 'retired' },
    ],
  },
  'retrofit': { isFixed: true, steps: [{ do: 'charge', daysAgo: 331, pounds: 68, purpose: 'retrofit', hour: 15 }, charge(190, [0.1, 0.25]), charge(74, [0.15, 0.35])] },
  'installed': { isFixed: true, steps: [{ do: 'installation', daysAgo: 392 }, charge(210, [0.12, 0.3]), charge(66, [0.2, 0.4])] },
  'rooftop-flat': {
    calls: seldom, isFixed: true,
    steps: [
      opening, charge(480, 0.4), charge(331, 0.5), { do: 'lose-all', daysAgo: 6 },
      { do: 'leak', daysAgo: 6, leak: 'coil', component: 'Condenser coil, circuit 1', cause: 'vibration-rub', method: 'bubbles', position: 'Third tube from below, rubbed by the conduit strap' },
      { do: 'repair', daysAgo: 5, leak: 'coil', repair: 'Tube soldered, strap moved and padded, drier replaced' },
      { do: 'verify', daysAgo: 5, kind: 'initial', leak: 'coil', type: 'Standing pressure, nitrogen, 400 psig' },
      { do: 'charge', daysAgo: 5, pounds: 60, leak: 'coil', hour: 15 },
      { do: 'verify', daysAgo: 1, kind: 'follow-up', leak: 'coil', type: 'Bubbles and electronic, at normal load', showsAll: true },
    ],
  },
  'rooftop-sister': {
    calls: seldom, isFixed: true,
    steps: [
      opening, charge(470, 0.3), charge(310, [0.2, 0.4]), charge(140, 0.35),
      { do: 'mark', daysAgo: 5, component: 'Condenser coil, circuit 2', text: 'Same nick as on circuit 1, fourth tube from below: not through yet. New coil recommended.' },
    ],
  },
  'rolling-far': { calls: inRolling, steps: [opening, charge(520, [0.2, 0.4]), charge(330, [0.04, 0.08]), charge(215, [0.15, 0.25]), charge(102, [0.04, 0.1])] },
  'rolling-near': { calls: inRolling, steps: [opening, charge(560, [0.2, 0.35]), charge(290, [0.38, 0.42]), charge(160, [0.04, 0.06]), ...coreLeak(29), charge(29, [0.36, 0.44], { leak: 'core' })] },
  'rolling-over': { calls: inRolling, steps: [opening, charge(560, [0.3, 0.4]), charge(283, [0.4, 0.5]), charge(150, [0.04, 0.08]), ...flareLeak(19), charge(19, [0.7, 0.9], { leak: 'flare' })] },
  'rolling-mended': {
    calls: inRolling,
    steps: [opening, charge(520, [0.3, 0.4]), ...flareLeak(298), charge(298, [0.9, 1.1], { leak: 'flare' }), followUp(290, 'flare'), charge(150, [0.1, 0.2]), charge(58, [0.1, 0.2])],
  },
}

const DRAWN_IN = 0.78 // least and greatest factor by which the days of a story are drawn in or out
const DRAWN_OUT = 1.06
const APART = 30 // [d] that a regular call keeps from the next thing told, at least
const ROUND = 28 // [d] a site is called at on one day of so many

/**
 * The story of one circuit, oldest first: days and amounts are drawn from the numbers given.
 *
 * @param roundsFrom  [d ago] a day on which the circuit's site was called at: the regular calls fall on its rounds
 */
export function storyOf(name: string, seeded: Seeded, roundsFrom = 0): Step[] {
  const story = STORIES[name]
  if (!story) throw new Error(`There is no story "${name}".`)
  const factor = story.isFixed ? 1 : seeded.between(DRAWN_IN, DRAWN_OUT)
  const told = story.steps.map((step) => ({ ...drawn(step, seeded), daysAgo: step.daysAgo === OPENED ? OPENED : Math.round(step.daysAgo * factor) }))
  const first = told.find((step) => step.daysAgo < OPENED)
  const calls = story.calls && first ? regularCalls(story.calls, first.daysAgo, seeded, roundsFrom) : []
  return [...told, ...calls].sort((a, b) => b.daysAgo - a.daysAgo)
}

const drawn = (step: Step<Share>, seeded: Seeded): Step =>
  step.do === 'charge' && typeof step.share === 'object' ? { ...step, share: seeded.between(...step.share) } : step as Step

function regularCalls({ times, share }: NonNullable<Story['calls']>, until: number, seeded: Seeded, roundsFrom: number): Step[] {
  const room = OPENED - APART - (until + APART)
  const count = Math.min(times, Math.floor(room / (2 * APART)))
  return Array.from({ length: Math.max(0, count) }, (_each, index) => ({
    do: 'charge', daysAgo: onRound(OPENED - APART - (room / count) * (index + seeded.between(0.25, 0.75)), roundsFrom), share: seeded.between(...share),
  }))
}

const onRound = (daysAgo: number, roundsFrom: number): number => Math.round((daysAgo - roundsFrom) / ROUND) * ROUND + roundsFrom
