import type { Preset } from '@primeuix/themes/types'

/** A house colour: its value for light and dark stands in tokens.css and nowhere else. */
const house = (name: string): string => `var(--wb-${name})`

/** Every step of a palette in one colour that tokens.css already turns for light and dark. */
const flatPalette = (colour: string, wash: string, hover: string, press: string) => ({
  50: wash, 100: wash, 200: wash, 300: colour, 400: colour, 500: colour, 600: hover, 700: press, 800: press, 900: press, 950: press,
})

const spruce = flatPalette(house('spruce'), house('spruce-wash'), house('spruce-hover'), house('spruce-press'))
const vermilion = flatPalette(house('over-text'), house('over-wash'), house('over-text'), house('over-text'))
const amber = flatPalette(house('near-text'), house('near-wash'), house('near-text'), house('near-text'))
const steel = flatPalette(house('flat-text'), house('flat-wash'), house('flat-text'), house('flat-text'))

const scheme = {
  surface: {
    0: house('sheet'), 50: house('hover'), 100: house('sunk'), 200: house('rule'), 300: house('rule-strong'), 400: house('field-line'),
    500: house('ink-soft'), 600: house('ink-soft'), 700: house('ink'), 800: house('ink'), 900: house('ink'), 950: house('ink'),
  },
  primary: { color: house('spruce'), contrastColor: house('on-spruce'), hoverColor: house('spruce-hover'), activeColor: house('spruce-press') },
  highlight: { background: house('spruce-wash'), focusBackground: house('spruce-wash'), color: house('ink'), focusColor: house('ink') },
  mask: { background: 'rgb(28 24 12 / 48%)', color: house('ink') },
  formField: {
    background: house('sheet'),
    disabledBackground: house('sunk'),
    filledBackground: house('sheet'),
    filledHoverBackground: house('sheet'),
    filledFocusBackground: house('sheet'),
    borderColor: house('field-line'),
    hoverBorderColor: house('ink-soft'),
    focusBorderColor: house('focus'),
    invalidBorderColor: house('over'),
    color: house('ink'),
    disabledColor: house('ink-soft'),
    placeholderColor: house('ink-soft'),
    invalidPlaceholderColor: house('over-text'),
    floatLabelColor: house('ink-soft'),
    floatLabelFocusColor: house('focus'),
    floatLabelActiveColor: house('ink-soft'),
    floatLabelInvalidColor: house('over-text'),
    iconColor: house('ink-soft'),
    shadow: 'none',
  },
  text: { color: house('ink'), hoverColor: house('ink'), mutedColor: house('ink-soft'), hoverMutedColor: house('ink') },
  content: { background: house('sheet'), hoverBackground: house('hover'), borderColor: house('rule'), color: house('ink'), hoverColor: house('ink') },
  overlay: {
    select: { background: house('sheet'), borderColor: house('field-line'), color: house('ink') },
    popover: { background: house('sheet'), borderColor: house('field-line'), color: house('ink') },
    modal: { background: house('sheet'), borderColor: house('ink'), color: house('ink') },
  },
  list: {
    option: {
      focusBackground: house('sunk'),
      selectedBackground: house('spruce-wash'),
      selectedFocusBackground: house('spruce-wash'),
      color: house('ink'),
      focusColor: house('ink'),
      selectedColor: house('ink'),
      selectedFocusColor: house('ink'),
      icon: { color: house('ink-soft'), focusColor: house('ink') },
    },
    optionGroup: { background: 'transparent', color: house('ink-soft') },
  },
}


const buttonScheme = {
  root: {
    primary: filled(house('spruce'), house('spruce-hover'), house('spruce-press'), house('on-spruce')),
    secondary: filled(house('sunk'), house('rule'), house('rule-strong'), house('ink')),
    danger: filled(house('over-text'), house('over-text'), house('over-text'), house('sheet')),
  },
  outlined: {
    primary: lined(house('spruce-wash'), house('spruce-wash'), house('spruce'), house('link')),
    secondary: lined(house('sunk'), house('rule'), house('field-line'), house('ink')),
    danger: lined(house('over-wash'), house('over-wash'), house('over-text'), house('over-text')),
  },
  text: {
    primary: lined(house('spruce-wash'), house('spruce-wash'), 'transparent', house('link')),
    secondary: lined(house('sunk'), house('rule'), 'transparent', house('ink')),
    danger: lined(house('over-wash'), house('over-wash'), 'transparent', house('over-text')),
  },
}

const textField = {
  root: {
    background: '{form.field.background}',
    disabledBackground: '{form.field.disabled.background}',
    filledBackground: '{form.field.background}',
    filledHoverBackground: '{form.field.background}',
    filledFocusBackground: '{form.field.background}',
    borderColor: '{form.field.border.color}',
    hoverBorderColor: '{form.field.hover.border.color}',
    focusBorderColor: '{form.field.focus.border.color}',
    invalidBorderColor: '{form.field.invalid.border.color}',
    color: '{form.field.color}',
    disabledColor: '{form.field.disabled.color}',
    placeholderColor: '{form.field.placeholder.color}',
    invalidPlaceholderColor: '{form.field.placeholder.color}',
    shadow: 'none',
    paddingX: '{form.field.padding.x}',
    paddingY: '{form.field.padding.y}',
    borderRadius: '{form.field.border.radius}',
    focusRing: ring('{form.field.focus.ring'),
    transitionDuration: '{transition.duration}',
  },
}

/**
 * The look of the house for PrimeVue: square-cut, ruled, without shadows; colours from tokens.css.
 * Only what every page needs stands here; a component used in one place brings its tokens along (theme/add-tokens.ts).
 */
export const weighbackPreset = {
  primitive: {
    borderRadius: { none: '0', xs: '2px', sm: '2px', md: '3px', lg: '3px', xl: '4px' },
    red: vermilion,
    orange: amber,
    amber,
    yellow: amber,
    green: spruce,
    sky: steel,
    purple: steel,
  },
  semantic: {
    transitionDuration: '120ms',
    focusRing: { width: '3px', style: 'solid', color: house('focus'), offset: '2px', shadow: 'none' },
    disabledOpacity: '0.55',
    iconSize: '1rem',
    anchorGutter: '2px',
    primary: spruce,
    formField: {
      paddingX: '0.75rem',
      paddingY: '0.5625rem',
      borderRadius: house('radius'),
      focusRing: { width: '2px', style: 'solid', color: house('focus'), offset: '-1px', shadow: 'none' },
      transitionDuration: '{transition.duration}',
      sm: { fontSize: '0.875rem', paddingX: '0.625rem', paddingY: '0.375rem' },
      lg: { fontSize: '1.125rem', paddingX: '0.875rem', paddingY: '0.625rem' },
    },
    list: {
      padding: '0',
      gap: '0',
      header: { padding: '0.5rem 0.75rem' },
      option: { padding: '0.625rem 0.75rem', borderRadius: '0' },
      optionGroup: { padding: '0.5rem 0.75rem', fontWeight: '600' },
    },
    content: { borderRadius: house('radius') },
    mask: { transitionDuration: '200ms' },
    navigation: {
      list: { padding: '0', gap: '0' },
      item: { padding: '0.625rem 0.75rem', borderRadius: '0', gap: '0.5rem' },
      submenuLabel: { padding: '0.5rem 0.75rem', fontWeight: '600' },
      submenuIcon: { size: '0.875rem' },
    },
    overlay: {
      select: { borderRadius: house('radius'), shadow: house('shadow-high') },
      popover: { borderRadius: house('radius'), padding: '0.75rem', shadow: house('shadow-high') },
      modal: { borderRadius: '4px', padding: '1.25rem', shadow: house('shadow-high') },
      navigation: { shadow: house('shadow-high') },
    },
    colorScheme: { light: scheme, dark: scheme },
  },
  components: {
    button: {
      root: {
        borderRadius: '{form.field.border.radius}',
        roundedBorderRadius: '2rem',
        gap: '0.5rem',
        paddingX: '1.0625rem',
        paddingY: '0.5625rem',
        iconOnlyWidth: '2.5rem',
        sm: { fontSize: '0.875rem', paddingX: '0.75rem', paddingY: '0.375rem', iconOnlyWidth: '2rem' },
        lg: { fontSize: '1.125rem', paddingX: '1.25rem', paddingY: '0.75rem', iconOnlyWidth: '3rem' },
        label: { fontWeight: '600' },
        raisedShadow: 'none',
        focusRing: { width: '{focus.ring.width}', style: '{focus.ring.style}', offset: '{focus.ring.offset}' },
        badgeSize: '1rem',
        transitionDuration: '{transition.duration}',
      },
      colorScheme: { light: buttonScheme, dark: buttonScheme },
    },
    inputtext: textField,
    textarea: textField,
  },
} satisfies Preset

function filled(background: string, hover: string, press: string, color: string) {
  return {
    background, hoverBackground: hover, activeBackground: press,
    borderColor: background, hoverBorderColor: hover, activeBorderColor: press,
    color, hoverColor: color, activeColor: color,
    focusRing: { color: house('focus'), shadow: 'none' },
  }
}

function lined(hoverBackground: string, activeBackground: string, borderColor: string, color: string) {
  return { hoverBackground, activeBackground, borderColor, color }
}

function ring(path: string) {
  return { width: `${path}.width}`, style: `${path}.style}`, color: `${path}.color}`, offset: `${path}.offset}`, shadow: `${path}.shadow}` }
}
