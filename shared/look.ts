/** The tokens of the look, on each ground a person may choose. Hex, as the contrast of each pair is worked out in a test. */
import type { Ground } from './schemas/lists'

export const TOKENS = ['paper', 'sheet', 'ink', 'graphite', 'bare', 'hairline', 'brass', 'brass-light', 'patina', 'patina-light', 'garnet', 'garnet-light', 'steel'] as const
export type Token = (typeof TOKENS)[number]

const PAPER: Record<Token, string> = {
  'paper': '#f7f3ea', 'sheet': '#fffdf8', 'ink': '#1c1a17', 'graphite': '#4a453f', 'bare': '#7c725f', 'hairline': '#d8cfbf', 'brass': '#63440a', 'brass-light': '#e9d6a8',
  'patina': '#15544c', 'patina-light': '#d5e8e3', 'garnet': '#8e1b2f', 'garnet-light': '#f6dfe1', 'steel': '#2f4654',
}
export const GROUND_TOKENS: Record<Ground, Record<Token, string>> = {
  paper: PAPER,
  grey: { ...PAPER, paper: '#e9ebec', sheet: '#f6f7f7', hairline: '#cdd1d3', bare: '#6f6a60' },
  peach: { ...PAPER, paper: '#f3e3cf', sheet: '#fbf1e3', hairline: '#dcc7ac', patina: '#124a43', bare: '#70664f', graphite: '#453f38', brass: '#5a3d08', garnet: '#7f1629' },
  dark: {
    'paper': '#1b1a18', 'sheet': '#24221f', 'ink': '#efe7d8', 'graphite': '#bdb3a3', 'bare': '#8f846f', 'hairline': '#3b3832', 'brass': '#d9a94a', 'brass-light': '#4a3a17',
    'patina': '#7cc9bb', 'patina-light': '#1f3a36', 'garnet': '#f494a0', 'garnet-light': '#43242a', 'steel': '#a9c1cf',
  },
}
/** The four safety colours and what is written on them (ANSI Z535.6 words; colours only help). */
export const SAFETY_COLOURS = { DANGER: ['#b3001b', '#ffffff'], WARNING: ['#ff9a3c', '#1c1a17'], CAUTION: ['#f7d64a', '#1c1a17'], NOTICE: ['#17539b', '#ffffff'] } as const
