import type { Regime } from '#shared/hydraulics/diagnosis.ts'

interface RegimeWords {
  label: string
  /** What the derivative does in such a span. */
  shows: string
}

const words: Record<Regime, RegimeWords> = {
  'casing-storage': {
    label: 'casing storage',
    shows: 'The derivative rises as fast as time, then comes off its crest.',
  },
  'linear-flow': { label: 'linear flow', shows: 'The derivative rises as the square root of time.' },
  'radial-flow': { label: 'radial flow', shows: 'The derivative is level.' },
  drainage: { label: 'delayed drainage', shows: 'The derivative falls and rises again.' },
  recharge: { label: 'recharge or leakage', shows: 'The derivative falls.' },
  barrier: { label: 'barrier', shows: 'The derivative rises above a level.' },
}

export const regimeWords = (regime: Regime): RegimeWords => words[regime]
