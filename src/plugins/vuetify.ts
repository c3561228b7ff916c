import 'vuetify/styles/core'
import { createVuetify, type ThemeDefinition } from 'vuetify'
import { aliases, mdi } from 'vuetify/iconsets/mdi-svg'
import { readPalettes, type Palette } from '@/styles/palette'
import tokens from '@/styles/tokens.css?raw'

const theme = (palette: Palette, dark: boolean): ThemeDefinition => {
  const colour = (name: string) => palette[name] ?? ''
  return {
    dark,
    colors: {
      background: colour('desk'),
      surface: colour('leaf'),
      'surface-variant': colour('ink'),
      'on-surface-variant': colour('paper'),
      primary: colour('blue'),
      'on-primary': colour('paper'),
      error: colour('madder'),
      success: colour('verdigris'),
      warning: colour('ochre'),
      info: colour('blue'),
      'on-background': colour('ink'),
      'on-surface': colour('ink'),
    },
    variables: {
      'border-color': colour('rule'),
      'border-opacity': 1,
      'high-emphasis-opacity': 1,
      'medium-emphasis-opacity': 1,
      'disabled-opacity': 1,
    },
  }
}

/** The nonce that the server puts into the page, without which our policy refuses Vuetify's style element. */
export const styleNonce = (): string | undefined =>
  document.querySelector<HTMLMetaElement>('meta[property="csp-nonce"]')?.nonce || undefined

export const makeVuetify = (appearance: 'light' | 'night') => {
  const palettes = readPalettes(tokens)
  return createVuetify({
    icons: { defaultSet: 'mdi', aliases, sets: { mdi } },
    theme: {
      cspNonce: styleNonce(),
      defaultTheme: appearance,
      themes: { light: theme(palettes.light, false), night: theme(palettes.night, true) },
    },
    defaults: {
      global: { ripple: false, elevation: 0 },
      VBtn: { variant: 'text' },
      VTextField: { variant: 'underlined', density: 'compact', hideDetails: 'auto' },
      VTextarea: { variant: 'underlined', density: 'compact', hideDetails: 'auto', autoGrow: true, rows: 2 },
      VSelect: { variant: 'underlined', density: 'compact', hideDetails: 'auto' },
      VAutocomplete: { variant: 'underlined', density: 'compact', hideDetails: 'auto' },
      VCombobox: { variant: 'underlined', density: 'compact', hideDetails: 'auto' },
      VCheckbox: { density: 'compact', hideDetails: 'auto' },
      VSwitch: { density: 'compact', hideDetails: 'auto', inset: true },
      VRadioGroup: { density: 'compact', hideDetails: 'auto' },
      VList: { density: 'compact' },
      VCard: { variant: 'flat' },
      VTooltip: { openDelay: 400, location: 'bottom' },
    },
  })
}
