import { definePreset } from '@primeuix/themes'
import auraBase from '@primeuix/themes/aura/base'
import autocomplete from '@primeuix/themes/aura/autocomplete'
import button from '@primeuix/themes/aura/button'
import checkbox from '@primeuix/themes/aura/checkbox'
import datatable from '@primeuix/themes/aura/datatable'
import dialog from '@primeuix/themes/aura/dialog'
import inputtext from '@primeuix/themes/aura/inputtext'
import textarea from '@primeuix/themes/aura/textarea'

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

/** The look of the house for PrimeVue: square-cut, ruled, without shadows; colours from tokens.css. */
export const weighbackPreset = definePreset(
  { semantic: auraBase.semantic, components: { autocomplete, button, checkbox, datatable, dialog, inputtext, textarea } },
  {
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
      primary: spruce,
      formField: {
        paddingX: '0.75rem',
        paddingY: '0.5625rem',
        borderRadius: house('radius'),
        focusRing: { width: '2px', style: 'solid', color: house('focus'), offset: '-1px', shadow: 'none' },
      },
      overlay: {
        select: { shadow: house('shadow-high') },
        popover: { shadow: house('shadow-high') },
        modal: { borderRadius: '4px', padding: '1.25rem', shadow: house('shadow-high') },
      },
      colorScheme: { light: scheme, dark: scheme },
    },
    components: {
      button: {
        root: { label: { fontWeight: '600' }, paddingX: '1.0625rem', paddingY: '0.5625rem' },
        colorScheme: {
          light: buttonScheme(),
          dark: buttonScheme(),
        },
      },
    },
  },
)

function buttonScheme() {
  return {
    root: {
      danger: {
        background: house('over-text'), hoverBackground: house('over-text'), activeBackground: house('over-text'),
        borderColor: house('over-text'), hoverBorderColor: house('over-text'), activeBorderColor: house('over-text'),
        color: house('sheet'), hoverColor: house('sheet'), activeColor: house('sheet'),
      },
    },
    outlined: {
      secondary: { hoverBackground: house('sunk'), activeBackground: house('rule'), borderColor: house('field-line'), color: house('ink') },
      danger: { hoverBackground: house('over-wash'), activeBackground: house('over-wash'), borderColor: house('over-text'), color: house('over-text') },
    },
    text: {
      primary: { hoverBackground: house('spruce-wash'), activeBackground: house('spruce-wash'), color: house('link') },
      secondary: { hoverBackground: house('sunk'), activeBackground: house('rule'), color: house('ink') },
    },
  }
}
