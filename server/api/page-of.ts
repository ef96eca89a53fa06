import type { Paging } from '#shared/contracts/common.ts'

/** A page of a list, as every list answers. */
export function pageOf<Item>(items: Item[], total: number, { offset }: Pick<Paging, 'offset'>) {
  const end = offset + items.length
  return { items, total, next: items.length > 0 && end < total ? end : null }
}
