import type { AnalysisResult, Finding, StorageClass } from './analysis.ts'

/** Values outside `refuse` are errors; outside `ask` they need a second look. Open at the ends where a bound is left out. */
interface LimitRule {
  quantity: 'T' | 'S'
  classes?: readonly StorageClass[]
  verdict: 'refuse' | 'ask'
  code: string
  /** True for a value that breaks the rule. */
  breaks: (value: number) => boolean
  params: Record<string, number>
}

/** Limits of what may be adopted, in SI. Common practice. */
export const limitRules: readonly LimitRule[] = [
  rule('T', 'refuse', 'limit-transmissivity', { low: 1e-10, high: 10 }),
  { ...rule('S', 'refuse', 'limit-storage', { low: 0, high: 0.5 }), breaks: (S) => !(S > 0 && S < 0.5) },
  rule('T', 'ask', 'unusual-transmissivity', { low: 1e-7, high: 0.5 }),
  rule('S', 'ask', 'unusual-elastic-storage', { low: 1e-6, high: 5e-3 }, ['elastic']),
  rule('S', 'ask', 'unusual-specific-yield', { low: 0.01, high: 0.35 }, ['specific-yield']),
]

/** Findings for T and S, wherever they come from: an analysis or a form. Refusals are `bad`, questions `caution`. */
export function limitFindings(values: {
  T?: number | null
  S?: number | null
  storageClass?: StorageClass | null
}): Finding[] {
  const refused = new Set<string>()
  return limitRules.flatMap(({ quantity, classes, verdict, code, breaks, params }) => {
    const value = values[quantity]
    if (value == null || refused.has(quantity) || !breaks(value)) return []
    if (classes && !(values.storageClass && classes.includes(values.storageClass))) return []
    if (verdict === 'refuse') refused.add(quantity)
    return [
      { code, severity: verdict === 'refuse' ? ('bad' as const) : ('caution' as const), params: { value, ...params } },
    ]
  })
}

/** True when a result holds a value that may not be adopted. */
export function isRefused({ findings }: Pick<AnalysisResult, 'findings'>): boolean {
  const refusals = limitRules.filter(({ verdict }) => verdict === 'refuse').map(({ code }) => code)
  return findings.some(({ code }) => refusals.includes(code))
}

function rule(
  quantity: LimitRule['quantity'],
  verdict: LimitRule['verdict'],
  code: string,
  params: { low: number; high: number },
  classes?: readonly StorageClass[],
): LimitRule {
  const breaks = (value: number) => !(value >= params.low && value <= params.high)
  return { quantity, verdict, code, breaks, params, ...(classes ? { classes } : {}) }
}
