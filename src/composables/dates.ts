const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' })
const clock = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' })

/** "14 Mar 2019", in the reader's own zone; "–" without a date. */
export const dateText = (iso: string | null | undefined): string => (iso ? day.format(new Date(iso)) : '–')

/** "14 Mar 2019, 09:05", in the reader's own zone; "–" without an instant. */
export const instantText = (iso: string | null | undefined): string =>
  iso ? `${dateText(iso)}, ${clock.format(new Date(iso))}` : '–'
