import type { NumberError } from '#shared/quantities/parse.ts'

type Params = Record<string, string | number>

const sentences: Record<NumberError, (params: Params) => string> = {
  'number/empty': () => 'Type a number.',
  'number/not-a-number': ({ text }) =>
    `"${text}" is not a number. Use digits with a decimal point or comma, such as 12.5.`,
  'number/ambiguous-separator': ({ text, asDecimal, asThousands }) =>
    `"${text}" can be read as ${asDecimal} or as ${asThousands}. Write ${asDecimal} with a decimal point, or ${asThousands} without a comma.`,
}

/** The sentence beside a form field whose text `parseNumber` refused. */
export function numberErrorText(code: NumberError, params: Params): string {
  return sentences[code](params)
}
