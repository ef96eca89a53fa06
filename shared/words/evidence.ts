/** Why a value has its evidence, one sentence a rule; the rules are in shared/hydraulics/evidence.ts. */
const sentences: Record<string, string> = {
  'legacy-number': 'Only the number came down to us: slight evidence.',
  slug: 'A slug test sees the surroundings of the screen only, and skin: slight evidence.',
  'specific-capacity': 'From specific capacity, well loss included: slight evidence.',
  'legacy-reviewed': 'From an old report with legible data that a reviewer checked: fair evidence.',
  'observation-firm': 'Observation well, radial flow shown, conditions hold: firm evidence.',
  'observation-fair': 'Observation well, but radial flow is not shown or a condition is in doubt: fair evidence.',
  'unconfined-single-well': 'A single well in an unconfined aquifer, without a recovery that agrees: slight evidence.',
  'recovery-agrees': 'A single well whose recovery agrees: fair evidence.',
  'single-well': 'A single well without a recovery that agrees: fair evidence, with a wider error.',
  'composite-share': 'The test drew on several units, and this is the share of one of them: slight evidence.',
  'storage-usable': 'The storage value can be used in estimates.',
  'storage-pumped-well': 'Storage from a pumped well alone is kept, but not used in estimates.',
  'storage-slug': 'Storage from a slug test is kept, but not used in estimates.',
  'storage-apparent':
    'The test was too short for a storage value of years to come: it is kept, but not used in estimates.',
  'storage-unclassified': 'It is not known what kind of storage this is: it is kept, but not used in estimates.',
}

/** @throws RangeError for a code without a sentence */
export function evidenceText(code: string): string {
  const sentence = sentences[code]
  if (!sentence) throw new RangeError(`No sentence for the evidence rule ${code}`)
  return sentence
}

/** What a step-drawdown test is evidence of. */
export const lossesText =
  'A step-drawdown test gives the losses of the well. They are kept with the well, and are no value of the aquifer.'
