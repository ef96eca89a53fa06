/** What a confidence note means for the reader. */
export type Severity = 'good' | 'note' | 'caution' | 'bad'

/** Near tests: how many lie within the range, how far the nearest, how many are firm. */
interface Nearness {
  within: number
  firm: number
  range_m: number
  nearest_m: number
  bearing_deg: number
}

interface Covered {
  inside: number
  n: number
  share: number
}

/** Every note's code and the numbers its sentence needs; SI, unrounded. */
export interface NoteParams {
  'too-few-values': { n: number; sites: number }
  'outside-unit': { unit: string; distance_m: number }
  'values-near': Nearness
  'values-some': Nearness
  'nearest-far': Nearness
  'beyond-range': Nearness
  'unit-mean-only': { n: number; sites: number }
  'one-cluster': { extent_m: number }
  'evidence-firm': { share: number }
  'evidence-mixed': { firm: number; fair: number; slight: number }
  'evidence-slight': { share: number }
  surrounded: { n: number }
  'outside-hull': { distance_m: number }
  'edge-near': { distance_m: number; unit: string }
  'coast-near': { distance_m: number }
  'barrier-between': { hidden: number; nearest_m: number }
  'neighbours-agree': { n: number; deviation: number }
  'neighbours-disagree': { n: number; deviation: number }
  'interval-narrow': { factor: number }
  'interval-wide': { factor: number }
  'interval-very-wide': { factor: number }
  'old-tests': { share: number; years: number }
  'one-test-dominates': { label: string; weight: number }
  'variogram-assumed': { from: string }
  'variogram-poor': { nuggetShare: number }
  'errors-exceed-scatter': Record<string, never>
  'coverage-holds': Covered
  'coverage-count': Covered
  'coverage-fails': Covered
  'spread-rescaled': { factor: number }
  'unit-by-outline': { unit: string }
  'position-poor': { label: string; accuracy_m: number; distance_m: number }
  'depth-outside-screens': { depth_m: number; top_m: number; bottom_m: number }
  'composite-values': { share: number }
  'slug-scale': { share: number }
  'stream-close': { stream: string; distance_m: number }
  'second-opinion-differs': { ratio: number }
  'values-left-out': { count: number }
  'model-outdated': Record<string, never>
}

export type NoteCode = keyof NoteParams

/** One confidence note, stored with the estimate; a union over the codes, so that `code` tells the shape of `params`. */
export type Note = { [C in NoteCode]: { code: C; severity: Severity; params: NoteParams[C] } }[NoteCode]
