import 'vuetify/styles/core'
import 'vuetify/styles/utilities'
import { createVuetify } from 'vuetify'
import { aliases, mdi } from 'vuetify/iconsets/mdi-svg'
import { cspNonce } from './csp-nonce.ts'
import { themes } from './theme.ts'

const field = {
  variant: 'outlined',
  density: 'comfortable',
  color: 'primary',
  hideDetails: 'auto',
} as const
const table = { density: 'compact', hover: true } as const

/** What a component looks like when nobody says otherwise: comfortable forms, compact tables, quiet buttons. */
const defaults = {
  VBtn: { variant: 'outlined', rounded: 'lg' },
  VBtnToggle: { variant: 'outlined', rounded: 'lg', density: 'comfortable' },
  VCard: { variant: 'flat', rounded: 'lg', border: true },
  VDialog: { maxWidth: 480 },
  VTextField: field,
  VTextarea: { ...field, autoGrow: true, rows: 3 },
  VSelect: field,
  VAutocomplete: field,
  VCombobox: field,
  VFileInput: field,
  VNumberInput: { ...field, controlVariant: 'hidden' },
  VCheckbox: { color: 'primary', density: 'comfortable', hideDetails: 'auto' },
  VRadioGroup: { color: 'primary', density: 'comfortable', hideDetails: 'auto' },
  VSwitch: { color: 'primary', density: 'comfortable', hideDetails: 'auto', inset: true },
  VTable: table,
  VDataTable: table,
  VDataTableServer: table,
  VDataTableVirtual: table,
  VList: { density: 'comfortable' },
  VMenu: { offset: 6 },
  VPagination: { variant: 'text', activeColor: 'primary', rounded: 'lg' },
  VTooltip: { openDelay: 400 },
} as const

export const createVuetifyPlugin = (defaultTheme: string) =>
  createVuetify({
    defaults,
    icons: { defaultSet: 'mdi', aliases, sets: { mdi } },
    display: { mobileBreakpoint: 800 },
    theme: { defaultTheme, themes, variations: false, cspNonce: cspNonce() },
  })
