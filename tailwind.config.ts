import type { Config } from 'tailwindcss'

/** Every colour is a variable of src/app/theme.css, so the night theme needs no second set of classes. */
const tokens = [
  'band',
  'band-ink',
  'band-ink-2',
  'band-rule',
  'paper',
  'sheet',
  'margin',
  'ink',
  'ink-2',
  'rule',
  'rule-2',
  'spruce',
  'spruce-2',
  'spruce-ink',
  'on-spruce',
  'copper',
  'copper-2',
  'copper-ink',
  'present',
  'absent',
  'second',
  'co2',
  'good',
  'good-2',
  'good-ink',
  'warn',
  'warn-2',
  'warn-ink',
  'stop',
  'stop-2',
  'stop-ink',
  'on-stop',
] as const

export default {
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      inherit: 'inherit',
      ...Object.fromEntries(tokens.map((token) => [token, `var(--${token})`])),
    },
    fontFamily: {
      sans: ['"Noto Sans"', '"Noto Sans Math"', 'sans-serif'],
      mono: [
        'ui-monospace',
        '"Noto Sans Mono"',
        '"SF Mono"',
        'Menlo',
        'Consolas',
        '"DejaVu Sans Mono"',
        'monospace',
      ],
    },
    fontSize: {
      xs: ['12px', '1.35'],
      sm: ['13px', '1.45'],
      base: ['15px', '1.5'],
      lg: ['17px', '1.35'],
      xl: ['19px', '1.3'],
      '2xl': ['24px', '1.25'],
      '3xl': ['32px', '1.1'],
    },
    screens: {
      tablet: '561px',
      wide: '1001px',
    },
  },
} satisfies Config
