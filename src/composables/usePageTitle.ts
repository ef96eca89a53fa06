import { onScopeDispose, readonly, shallowReactive, toValue, watchEffect, computed, type MaybeRefOrGetter } from 'vue'

interface Title {
  text: string
}

const titles = shallowReactive<Title[]>([])

/** The name of what is open, in the window's title while the calling component lives; the newest one counts. */
export function usePageTitle(text: MaybeRefOrGetter<string>) {
  const title = shallowReactive<Title>({ text: '' })
  watchEffect(() => (title.text = toValue(text)))
  titles.push(title)
  onScopeDispose(() => titles.splice(titles.indexOf(title), 1))
}

/** The newest name that a heading gave, or null. */
export const openTitle = readonly(computed(() => titles.at(-1)?.text ?? null))
