/** One thing that happened to a demo circuit. Amounts are in pounds, or as a share of what the threshold would allow on that day. */
export type Step = { daysAgo: number } & (
  | { do: 'opening' }
  | { do: 'installation' }
  | { do: 'charge'; share?: number; pounds?: number; purpose?: 'leak' | 'seasonal'; leak?: string; isComplete?: boolean; isOfOneCylinder?: boolean; hour?: number }
  | { do: 'recover'; pounds?: number; purpose: 'repair' | 'seasonal' | 'retirement'; isComplete?: boolean }
  | { do: 'lose-all' }
  | { do: 'reverse-last'; reason: string }
  | { do: 'leak'; leak: string; component: string; cause: 'vibration-rub' | 'corrosion' | 'joint' | 'wear'; method: 'bubbles' | 'electronic' | 'ultrasonic'; position: string }
  | { do: 'repair'; leak: string; repair: string }
  | { do: 'verify'; kind: 'initial' | 'follow-up'; leak: string; type: string; showsAll?: boolean }
  | { do: 'mark'; component: string; text: string }
  | { do: 'status'; status: 'mothballed' | 'retired' })

const OPENED = 725 // [d] the demo company began its ledger so long ago

const opening: Step = { do: 'opening', daysAgo: OPENED }
const schraderLeak = (daysAgo: number): Step[] => [
  { do: 'leak', daysAgo, leak: 'core', component: 'Service port', cause: 'wear', method: 'electronic', position: 'Valve core, liquid side' },
  { do: 'repair', daysAgo, leak: 'core', repair: 'Core and cap replaced' },
  { do: 'verify', daysAgo, kind: 'initial', leak: 'core', type: 'Standing pressure, nitrogen' },
]
const flareLeak = (daysAgo: number): Step[] => [
  { do: 'leak', daysAgo, leak: 'flare', component: 'Liquid line joint', cause: 'joint', method: 'bubbles', position: 'Flare nut at the drier' },
  { do: 'repair', daysAgo, leak: 'flare', repair: 'Flare remade, drier replaced' },
  { do: 'verify', daysAgo, kind: 'initial', leak: 'flare', type: 'Standing pressure, nitrogen' },
]

/** What happened to a circuit, by the name of its story in fixtures/demo/company.json. */
export const STORIES: Record<string, readonly Step[]> = {
  untouched: [opening],
  quiet: [opening, { do: 'charge', daysAgo: 610, share: 0.15 }, { do: 'charge', daysAgo: 190, share: 0.12 }],
  far: [opening, { do: 'charge', daysAgo: 540, share: 0.35 }, { do: 'charge', daysAgo: 262, share: 0.22 }, { do: 'charge', daysAgo: 83, share: 0.4 }],
  near: [opening, { do: 'charge', daysAgo: 505, share: 0.3 }, { do: 'charge', daysAgo: 214, share: 0.55 }, ...schraderLeak(38), { do: 'charge', daysAgo: 38, share: 0.86, leak: 'core' }],
  over: [
    opening, { do: 'charge', daysAgo: 452, share: 0.5 }, { do: 'charge', daysAgo: 151, share: 0.75 }, ...flareLeak(12),
    { do: 'charge', daysAgo: 12, share: 1.7, leak: 'flare' },
  ],
  flat: [opening, { do: 'charge', daysAgo: 305, share: 0.5 }, { do: 'lose-all', daysAgo: 3 }],
  grouped: [
    opening, { do: 'charge', daysAgo: 420, share: 0.4 }, ...flareLeak(96), { do: 'charge', daysAgo: 96, share: 0.4, leak: 'flare', isComplete: false },
    { do: 'charge', daysAgo: 88, share: 0.4, leak: 'flare' }, { do: 'verify', daysAgo: 80, kind: 'follow-up', leak: 'flare', type: 'Electronic, at normal load', showsAll: true },
  ],
  'same-day': [
    opening, { do: 'charge', daysAgo: 380, share: 0.4 }, { do: 'charge', daysAgo: 45, share: 0.35, isComplete: false, hour: 15 }, { do: 'charge', daysAgo: 45, share: 0.25, hour: 20 },
  ],
  seasonal: [opening, { do: 'recover', daysAgo: 236, pounds: 12, purpose: 'seasonal' }, { do: 'charge', daysAgo: 61, pounds: 14, purpose: 'seasonal' }],
  reversed: [
    opening, { do: 'charge', daysAgo: 400, share: 0.4 }, { do: 'charge', daysAgo: 74, pounds: 26, isOfOneCylinder: true },
    { do: 'reverse-last', daysAgo: 73, reason: 'Weighed on circuit 2, entered on circuit 1' }, { do: 'charge', daysAgo: 72, share: 0.3 },
  ],
  returned: [
    opening, { do: 'charge', daysAgo: 350, share: 0.3 }, { do: 'recover', daysAgo: 70, pounds: 6, purpose: 'repair' }, ...flareLeak(70),
    { do: 'charge', daysAgo: 70, pounds: 6.5, leak: 'flare', hour: 21 },
  ],
  mothballed: [opening, { do: 'charge', daysAgo: 500, share: 0.4 }, { do: 'recover', daysAgo: 124, purpose: 'repair', isComplete: true }, { do: 'status', daysAgo: 124, status: 'mothballed' }],
  retired: [opening, { do: 'charge', daysAgo: 480, share: 0.9 }, { do: 'recover', daysAgo: 205, purpose: 'retirement', isComplete: true }, { do: 'status', daysAgo: 205, status: 'retired' }],
  installed: [{ do: 'installation', daysAgo: 392 }, { do: 'charge', daysAgo: 66, share: 0.3 }],
  'rooftop-flat': [
    opening, { do: 'charge', daysAgo: 560, share: 0.4 }, { do: 'charge', daysAgo: 331, share: 0.5 }, { do: 'lose-all', daysAgo: 6 },
    { do: 'leak', daysAgo: 6, leak: 'coil', component: 'Condenser coil, circuit 1', cause: 'vibration-rub', method: 'bubbles', position: 'Third tube from below, rubbed by the conduit strap' },
    { do: 'repair', daysAgo: 5, leak: 'coil', repair: 'Tube soldered, strap moved and padded, drier replaced' },
    { do: 'verify', daysAgo: 5, kind: 'initial', leak: 'coil', type: 'Standing pressure, nitrogen, 400 psig' },
    { do: 'charge', daysAgo: 5, pounds: 60, leak: 'coil', hour: 21 },
    { do: 'verify', daysAgo: 1, kind: 'follow-up', leak: 'coil', type: 'Bubbles and electronic, at normal load', showsAll: true },
  ],
  'rooftop-sister': [
    opening, { do: 'charge', daysAgo: 470, share: 0.3 }, { do: 'charge', daysAgo: 140, share: 0.35 },
    { do: 'mark', daysAgo: 5, component: 'Condenser coil, circuit 2', text: 'Same nick as on circuit 1, fourth tube from below: not through yet. New coil recommended.' },
  ],
  'rolling-far': [opening, { do: 'charge', daysAgo: 520, share: 0.5 }, { do: 'charge', daysAgo: 215, share: 0.3 }],
  'rolling-near': [opening, { do: 'charge', daysAgo: 560, share: 0.4 }, { do: 'charge', daysAgo: 301, share: 0.45 }, ...schraderLeak(29), { do: 'charge', daysAgo: 29, share: 0.4, leak: 'core' }],
  'rolling-over': [opening, { do: 'charge', daysAgo: 590, share: 0.6 }, { do: 'charge', daysAgo: 283, share: 0.65 }, ...flareLeak(19), { do: 'charge', daysAgo: 19, share: 0.62, leak: 'flare' }],
}
