const calendarDay = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'long',
  year: 'numeric',
  timeZone: 'UTC',
})

/** "14 March 2019", by universal time, so that a report reads alike wherever it was made. */
export const reportDate = (iso: string): string => calendarDay.format(new Date(iso))

/** The start of a test as it keeps it: "14 March 2019, 09:30 (Etc/GMT+1)", "14 March 2019", "1987". */
export function reportStart(start: { startLocal: string; startPrecision: string; zone: string }): string {
  if (start.startPrecision === 'year') return start.startLocal.slice(0, 4)
  const day = reportDate(`${start.startLocal.slice(0, 10)}T00:00:00Z`)
  return start.startPrecision === 'day' ? day : `${day}, ${start.startLocal.slice(11, 16)} (${start.zone})`
}
