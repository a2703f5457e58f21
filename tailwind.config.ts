import type { Config } from 'tailwindcss'
import plugin from 'tailwindcss/plugin'
import { GROUND_TOKENS, SAFETY_COLOURS, TOKENS } from './shared/look'

/** Hex as the three numbers that Tailwind puts an opacity beside. */
const channels = (hex: string): string => [1, 3, 5].map(at => Number.parseInt(hex.slice(at, at + 2), 16)).join(' ')
const variables = (tokens: Record<string, string>) => Object.fromEntries(Object.entries(tokens).map(([name, hex]) => [`--${name}`, channels(hex)]))

export default {
  content: ['./app/**/*.{vue,ts}'],
  theme: {
    extend: {
      colors: {
        ...Object.fromEntries(TOKENS.map(name => [name, `rgb(var(--${name}) / <alpha-value>)`])),
        danger: SAFETY_COLOURS.DANGER[0], warning: SAFETY_COLOURS.WARNING[0], caution: SAFETY_COLOURS.CAUTION[0], notice: SAFETY_COLOURS.NOTICE[0],
      },
      fontFamily: { sans: ['"Atkinson Hyperlegible"', '"Noto Sans"', 'sans-serif'] },
      borderRadius: { control: '3px' },
      accentColor: { ink: 'rgb(var(--ink))' },
    },
  },
  plugins: [plugin(({ addBase }) => {
    addBase({ ':root': variables(GROUND_TOKENS.paper), ...Object.fromEntries(Object.entries(GROUND_TOKENS).map(([ground, tokens]) => [`[data-ground="${ground}"]`, variables(tokens)])) })
  })],
} satisfies Config
