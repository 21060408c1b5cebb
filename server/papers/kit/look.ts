/** Colours of the house on paper: the light palette of the screens, on white. */
export const COLOUR = {
  ink: '#1c1a15',
  soft: '#57513f',
  rule: '#d9cfb9',
  ruleStrong: '#b5a98b',
  spruce: '#14493d',
  spruceWash: '#eef4ee',
  near: '#d18a0f',
  nearText: '#7d4c00',
  over: '#d13a1a',
  overText: '#ab2a0f',
  overWash: '#fdf1ec',
  far: '#2d7a63',
  farText: '#1b5c49',
  sunk: '#f6f2e8',
} as const

export type Weight = 'regular' | 'semibold'

/** How a piece of text is set. */
export interface TextStyle {
  weight: Weight
  /** [pt] */
  size: number
  colour: string
  /** Figures of one width, so that columns of numbers stand under each other. */
  hasTabularFigures?: boolean
}

/** [size of the font] from one line to the next */
export const LEADING = 1.34

export const STYLE = {
  title: { weight: 'semibold', size: 20, colour: COLOUR.ink },
  heading: { weight: 'semibold', size: 11.5, colour: COLOUR.spruce },
  subheading: { weight: 'semibold', size: 8.6, colour: COLOUR.ink },
  body: { weight: 'regular', size: 8.8, colour: COLOUR.ink },
  small: { weight: 'regular', size: 7.6, colour: COLOUR.soft },
  smallStrong: { weight: 'semibold', size: 7.6, colour: COLOUR.ink },
  label: { weight: 'semibold', size: 6.9, colour: COLOUR.soft },
  value: { weight: 'regular', size: 8.8, colour: COLOUR.ink, hasTabularFigures: true },
  strong: { weight: 'semibold', size: 8.8, colour: COLOUR.ink, hasTabularFigures: true },
  cell: { weight: 'regular', size: 7.8, colour: COLOUR.ink, hasTabularFigures: true },
  cellStrong: { weight: 'semibold', size: 7.8, colour: COLOUR.ink, hasTabularFigures: true },
  figure: { weight: 'semibold', size: 17, colour: COLOUR.ink, hasTabularFigures: true },
} as const satisfies Record<string, TextStyle>

/** Letter where Letter is the paper of the country, A4 elsewhere. [pt] */
export type PaperSize = 'LETTER' | 'A4'
const LETTER_COUNTRIES = ['US', 'CA']
export const paperSizeOf = (country: string): PaperSize => (LETTER_COUNTRIES.includes(country) ? 'LETTER' : 'A4')

/** [pt] */
export const MARGIN = { left: 48, right: 48, top: 62, bottom: 58 }
