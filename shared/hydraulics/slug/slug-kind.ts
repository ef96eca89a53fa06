import type { Kind } from '../kind.ts'
import { bouwerRice } from './bouwer-rice.ts'
import { cooperBredehoeftPapadopulos } from './fit-cooper-bredehoeft-papadopulos.ts'
import { hvorslev } from './hvorslev.ts'
import { nearCritical } from './near-critical.ts'
import { oscillating } from './oscillating.ts'
import type { SlugInputs, SlugOptions } from './slug-test.ts'

export const slugTests: Kind<SlugInputs, SlugOptions> = {
  id: 'slug',
  label: 'Slug test',
  methods: {
    [hvorslev.id]: hvorslev,
    [bouwerRice.id]: bouwerRice,
    [cooperBredehoeftPapadopulos.id]: cooperBredehoeftPapadopulos,
    [oscillating.id]: oscillating,
    [nearCritical.id]: nearCritical,
  },
}
