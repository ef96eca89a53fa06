import type { Job } from '#shared/contracts/jobs.ts'

export const jobStateWords: Record<Job['state'], string> = {
  waiting: 'Waiting',
  running: 'Running',
  done: 'Done',
  failed: 'Failed',
  cancelled: 'Cancelled',
}

const kinds: Record<string, string> = {
  mail: 'Send a mail',
  'clean-up': 'Remove what has expired',
}

/** What a kind of job does; a kind without a word of its own is shown by its name. */
export const jobKindText = (kind: string): string => kinds[kind] ?? kind.replaceAll('-', ' ')
