import type { Agreement, SharedBasis } from '#shared/hydraulics/agreement.ts'
import { formatNumber } from '#shared/quantities/format.ts'

const verdicts: Record<Agreement['code'], string> = {
  agree: 'agree',
  'agree-roughly': 'agree roughly',
  disagree: 'disagree',
}

/** What agreement between analyses that share something does and does not confirm. */
const basis: Record<Exclude<SharedBasis, 'rate' | 'distances'>, string> = {
  'same-readings': 'Both use the same readings and the same rate, so they test the method, not the data.',
  'same-well': 'Both use the same well and rate but different readings, so they test the drawdowns, not the rate.',
  'other-well': 'They use different wells but the same rate, so they test the drawdowns, not the rate.',
}

/** A pair of analyses as a plain sentence or two: how far apart, whether the intervals meet, what they share. */
export function agreementText({ code, ratio, intervalsMeet, shared, params }: Agreement): string {
  const factor = formatNumber(ratio, { figures: 3 })
  const meet = intervalsMeet ? 'their intervals meet' : 'their intervals do not meet'
  const sentences = [
    `${params.a} and ${params.b} ${verdicts[code]}: transmissivity differs by a factor of ${factor}, and ${meet}.`,
  ]
  for (const one of shared) if (one !== 'rate' && one !== 'distances') sentences.push(basis[one])
  if (shared.includes('distances')) sentences.push('Both rest on the same distances.')
  return sentences.join(' ')
}
