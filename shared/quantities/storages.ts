import type { Unit } from './unit.ts'

/** Storativity and specific yield are pure numbers; a specific yield is often written in per cent. */
export const storages: Unit[] = [
  { id: '1', dimension: 'storage', label: '', toSI: 1, aliases: ['-', 'none', 'dimensionless'], source: 'pure number' },
  {
    id: '%',
    dimension: 'storage',
    label: '%',
    toSI: 1e-2,
    aliases: ['percent', 'per cent', 'pct'],
    source: 'SP 811 7.10.2',
  },
]
