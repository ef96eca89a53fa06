import { computed } from 'vue'
import { useRoute, useRouter, type LocationQueryRaw } from 'vue-router'
import type { z } from 'zod'

interface Options<Asked extends object> {
  /** Under which names the parts stand in the address: short, because people read and share it. */
  names: Record<string, keyof Asked>
  /** What a part must be; a usual value of a part is `undefined`, and is not written. */
  fields: { [Part in keyof Asked]-?: z.ZodType<Asked[Part]> }
}

/** Parts to set; an emptied field gives null or no letters. */
export type Changes<Asked> = { [Part in keyof Asked]?: Asked[Part] | null }

/** A question with some parts set and the emptied ones gone. */
export function withChanges<Asked extends object>(asked: Asked, changes: Changes<Asked>): Asked {
  const kept = Object.entries({ ...asked, ...changes }).filter(([, value]) => value != null && value !== '')
  return Object.fromEntries(kept) as Asked
}

/**
 * What a list is asked and which page of it is shown. It stands in the address, so that Back, a reload and links bring
 * the same rows.
 */
export function useAddressQuestion<Asked extends object>({ names, fields }: Options<Asked>) {
  const route = useRoute()
  const router = useRouter()

  /** A part of the address is left out where it is no such thing: a link may come from anywhere. */
  function read(query: LocationQueryRaw): Asked {
    const parts = Object.entries(names).flatMap(([name, part]) => {
      const text = query[name]
      const parsed = typeof text === 'string' && text !== '' ? fields[part].safeParse(text) : null
      return parsed?.success ? [[part, parsed.data] as const] : []
    })
    return Object.fromEntries(parts.filter(([, value]) => value !== undefined)) as Asked
  }

  function write(asked: Asked): LocationQueryRaw {
    const written = Object.entries(names).map(([name, part]) => [name, asked[part]] as const)
    return Object.fromEntries(written.filter(([, value]) => value !== undefined && value !== '')) as LocationQueryRaw
  }

  const asked = computed(() => read(route.query))
  const page = computed(() => Math.max(1, Math.floor(Number(route.query.page)) || 1))

  const go = (wanted: Asked, number: number, replace: boolean) =>
    router[replace ? 'replace' : 'push']({
      name: String(route.name),
      params: route.params,
      query: { ...write(wanted), ...(number === 1 ? {} : { page: number }) },
    })

  return {
    asked,
    page,
    /** Begins at the first page. `typed`: the letters of a word are not steps that Back should undo one by one. */
    ask: (wanted: Asked, typed = false) => go(wanted, 1, typed),
    /** `instead`: the page that was asked for is none, and Back should not lead there. */
    turn: (number: number, instead = false) => go(asked.value, number, instead),
  }
}
