/** Cautions stand where a decision is made, short, and are said alike on the page and in documents. */
export const cautions = {
  planning:
    'An estimate is for planning. It is not a test of the site and gives no right to abstract; local codes, licences and a licensed practitioner decide.',
  discharge:
    'Test water must be discharged where it is allowed and cannot return to the aquifer near the test. Check quality and permits first.',
  site: 'Wells, pumps and generators are dangerous places of work: electrical, lifting, confined-space and traffic rules apply.',
  map: 'Coordinates on the bundled maps are for orientation, not for locating buried services.',
  drawdown:
    'Pumping near a coast or a contaminated site can draw in salt or polluted water; lower water levels can cause settlement or sinkholes.',
} as const

export type CautionId = keyof typeof cautions

/** All of them, the one that concerns the number itself first. */
export const estimateCautions: readonly CautionId[] = ['planning', 'drawdown', 'discharge', 'site', 'map']
