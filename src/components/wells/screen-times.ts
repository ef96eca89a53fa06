import type { Well } from '#shared/contracts/wells.ts'
import { dateText } from '../../composables/dates.ts'

type Screen = Pick<Well['screens'][number], 'validFrom' | 'validTo'>

/** Whether the screen is open today. */
export function isCurrentScreen({ validFrom, validTo }: Screen): boolean {
  const now = Date.now()
  return (validFrom === null || Date.parse(validFrom) <= now) && (validTo === null || Date.parse(validTo) > now)
}

/** "since 2 Mar 1998", "until 4 May 2004"; nothing for a screen that was always there. */
export function screenTimes({ validFrom, validTo }: Screen): string {
  if (validFrom && validTo) return `${dateText(validFrom)} to ${dateText(validTo)}`
  if (validFrom) return `since ${dateText(validFrom)}`
  return validTo ? `until ${dateText(validTo)}` : ''
}
