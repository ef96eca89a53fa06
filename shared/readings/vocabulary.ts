import type { CellKind } from './cells.ts'
import type { ColumnRole } from './model.ts'

/** Depths below a datum, in the name or in its unit: "WL (m bgl)". */
const BELOW = /below|\b(?:m|ft)?[\s_-]*b\.?(?:g\.?[ls]?|t\.?o\.?c|m\.?p)\b/

/**
 * Words in column names, in the languages field logs come in (English, German, French, Spanish).
 * The first entry that fits both the name and what the column holds gives the role.
 * `words` see the name without units in brackets, `withUnit` the whole of it.
 */
export const vocabulary: { role: ColumnRole; kinds: CellKind[]; words: RegExp; withUnit?: RegExp }[] = [
  {
    role: 'ignored',
    kinds: ['number', 'text', 'blank'],
    words:
      /temp|°c|batter|volt|conduct|salin|press|baro|\bflow\b|\brate\b|discharge|comment|remark|\bnotes?\b|operator|quality|serial|record|\bno\b|\bnr\b|\bid\b|index|#|bemerkung|leitf|druck/,
  },
  {
    role: 'drawdown',
    kinds: ['number'],
    words: /draw\s*-?down|displacement|residual|absenkung|rabattement|abatimiento|^s\d?$/,
  },
  {
    role: 'depth',
    kinds: ['number'],
    words: /depth|\bdtw|\bdtgw|\bdip\b|tiefe|abstich|profond|profund/,
    withUnit: BELOW,
  },
  {
    role: 'level',
    kinds: ['number'],
    words: /level|elev|\bhead\b|\bwl\b|stage|niveau|nivel|wasserstand|m\.?a\.?s\.?l|\bcote\b|\bcota\b/,
  },
  {
    role: 'elapsed',
    kinds: ['number', 'time'],
    words: /elapsed|since|minutes|seconds|\bet\b|dauer|écoul|ecoul|transcurrido/,
  },
  { role: 'date', kinds: ['date'], words: /./ },
  { role: 'clock', kinds: ['datetime'], words: /./ },
  { role: 'date', kinds: ['number'], words: /^date$|^datum$|^fecha$|yyyymmdd/ },
  { role: 'clock', kinds: ['time'], words: /time|clock|zeit|uhr|heure|hora/ },
  { role: 'elapsed', kinds: ['number'], words: /time|^t\b|zeit|temps|tiempo/ },
]
