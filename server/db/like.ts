/** A LIKE pattern that finds `text` anywhere, taking its own `%`, `_` and `\` literally. */
export const containing = (text: string): string => `%${text.replace(/[\\%_]/g, '\\$&')}%`
