import { readFileSync } from 'node:fs'
import { expect, it } from 'vitest'

const read = (path: string) => readFileSync(path, 'utf8').replace(/\/\*.*?\*\//gs, '')

/** Names of layers in the order in which a stylesheet declares them. */
const names = (css: string) =>
  [...css.matchAll(/@layer ([^;{]+)/g)].flatMap(([, list]) => list!.split(',').map((name) => name.trim()))

it('The layers rank as Vuetify declares them, whichever stylesheet a page loads first', () => {
  expect(names(read('src/public/layers.css'))).toEqual(names(read('node_modules/vuetify/lib/styles/layers.css')))
  const page = readFileSync('index.html', 'utf8')
  expect(page.indexOf('/layers.css')).toBeGreaterThan(0)
  expect(page.indexOf('/layers.css')).toBeLessThan(page.indexOf('<script'))
})
