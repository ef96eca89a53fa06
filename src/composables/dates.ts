const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' })
const clock = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' })

/** "14 Mar 2019", in the reader's own zone; "–" without a date. */
export const dateText = (iso: string | null | undefined): string => (iso ? day.format(new Date(iso)) : '–')

/** "14 Mar 2019, 09:05", in the reader's own zone; "–" without an instant. */
export const instantText = (iso: string | null | undefined): string =>
  iso ? `${dateText(iso)}, ${clock.format(new Date(iso))}` : '–'

const calendarDay = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  timeZone: 'UTC',
})

/** The day or year of a wall-clock time that a test keeps ("2019-03-14T09:00", "1987"), wherever the reader is. */
export const wallDateText = (local: string): string =>
  /^\d{4}$/.test(local) ? local : calendarDay.format(new Date(`${local.slice(0, 10)}T00:00Z`))
