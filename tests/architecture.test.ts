import { readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import { rules } from './support/architecture/rules.ts'
import { readProject, type SourceFile } from './support/architecture/source-file.ts'
import { strayEntries } from './support/architecture/text-rules.ts'

const top = fileURLToPath(new URL('..', import.meta.url))
const project = readProject(top)

/** The first rule parses every file. */
const readingTime = 60_000

const broken = (rule: string, files: SourceFile[]) =>
  (rules[rule]?.(files) ?? []).map(({ path, message }) => `${path} ${message}`)

describe('the project', () => {
  it('is read whole', () => {
    const folders = new Set(project.map(({ path }) => path.split('/')[0]))
    for (const folder of ['src', 'server', 'shared', 'tests']) expect(folders).toContain(folder)
  })

  for (const rule of Object.keys(rules)) {
    it(`keeps the rule: ${rule}`, () => expect(broken(rule, project)).toEqual([]), readingTime)
  }

  it('has nothing at its top that belongs elsewhere', () => {
    expect(strayEntries(readdirSync(top), readFileSync(join(top, '.gitignore'), 'utf8'))).toEqual([])
  })
})

/** What must be caught, and beside it what must pass: path, text. */
type Case = [path: string, text: string]
const cases: Record<string, { bad: Case[]; good: Case[] }> = {
  'shared code imports in one direction': {
    bad: [
      ['shared/numerics/a.ts', "import { m } from '#shared/quantities/unit.ts'"],
      ['shared/geodesy/a.ts', "export * from '../readings/log.ts'"],
      ['shared/hydraulics/a.ts', "import type { K } from '../geostatistics/kriging.ts'"],
      ['shared/words/a.ts', "import { roles } from '#shared/contracts/permissions.ts'"],
      ['shared/imports/a.ts', "type C = import('#shared/contracts/common.ts').C"],
      ['shared/readings/a.ts', "const late = () => import('../estimates/notes.ts')"],
      ['shared/estimates/a.ts', "import { db } from '../../server/db/client.ts'"],
      ['shared/misc/a.ts', "import { b } from './b.ts'"],
    ],
    good: [
      ['shared/geodesy/a.ts', "import { formatDecimals } from '#shared/quantities/format.ts'"],
      ['shared/words/a.ts', "import type { Role } from '#shared/contracts/permissions.ts'"],
      ['shared/contracts/a.ts', "import { texts } from '../words/errors/index.ts'"],
    ],
  },
  'page and server never import each other': {
    bad: [
      ['src/api/a.ts', "import type { Row } from '../../server/db/rows.ts'"],
      ['server/mail/a.ts', "import { link } from '../../src/router/links.ts'"],
    ],
    good: [['src/api/a.ts', "import { well } from '#shared/contracts/wells.ts'"]],
  },
  'the page imports from api to views': {
    bad: [
      ['src/api/a.ts', "import { useSession } from '../stores/session.ts'"],
      ['src/stores/a.ts', "import Card from '../components/base/Card.vue'"],
      ['src/components/base/A.vue', '<script setup lang="ts">\nimport Map from "../../views/MapView.vue"\n</script>'],
      ['src/composables/a.ts', "import App from '../App.vue'"],
    ],
    good: [
      ['src/views/A.vue', '<script setup lang="ts">\nimport Card from "../components/base/Card.vue"\n</script>'],
      ['src/components/base/A.vue', '<script setup>\nimport { toWell } from "../../router/links.ts"\n</script>'],
    ],
  },
  'the server imports from repository to routes, and other resources through their service': {
    bad: [
      ['server/api/wells/wells.repository.ts', "import { makeWell } from './wells.service.ts'"],
      ['server/api/wells/wells.service.ts', "import { routes } from './wells.routes.ts'"],
      ['server/api/wells/wells.routes.ts', "import { findWell } from './wells.repository.ts'"],
      ['server/api/wells/wells.service.ts', "import { findTest } from '../pumping-tests/pumping-tests.repository.ts'"],
      ['server/api/wells/wells.repository.ts', "import { tests } from '../pumping-tests/pumping-tests.service.ts'"],
    ],
    good: [
      ['server/api/wells/wells.service.ts', "import { findWell } from './wells.repository.ts'"],
      ['server/api/wells/wells.routes.ts', "import { tests } from '../pumping-tests/pumping-tests.service.ts'"],
      ['server/api/wells/wells.service.ts', "import type { Row } from '../pumping-tests/pumping-tests.repository.ts'"],
      ['server/api/index.ts', "import { routes } from './wells/wells.routes.ts'"],
    ],
  },
  'shared code is pure': {
    bad: [
      ['shared/readings/a.ts', "import { readFileSync } from 'node:fs'"],
      ['shared/readings/a.ts', "import path from 'path'"],
      ['shared/readings/a.ts', "import { ref } from 'vue'"],
      ['shared/readings/a.ts', 'export const now = () => Date.now()'],
      ['shared/readings/a.ts', 'export const today = () => new Date()'],
      ['shared/numerics/a.ts', 'export const draw = () => Math.random()'],
      ['shared/readings/a.ts', "export const root = () => document.querySelector('main')"],
      ['shared/readings/a.ts', "export const load = () => fetch('/api/wells')"],
    ],
    good: [
      ['shared/readings/a.ts', 'export const day = (document: { date: string }) => new Date(document.date)'],
      ['shared/numerics/a.ts', "import { Matrix } from 'ml-matrix'"],
    ],
  },
  'SQL stays in repositories': {
    bad: [
      ['server/api/wells/wells.service.ts', "import { eq } from 'drizzle-orm'"],
      ['server/api/wells/wells.service.ts', "import { wells } from '../../db/schema/index.ts'"],
      ['server/api/wells/wells.service.ts', 'const text = `select id from wells where code = ${code}`'],
      ['server/reports/a.ts', "import { createPool } from 'mysql2/promise'"],
    ],
    good: [
      ['server/api/wells/wells.repository.ts', "import { eq } from 'drizzle-orm'"],
      ['server/api/wells/wells.service.ts', "import type { WellRow } from '../../db/schema/index.ts'"],
      ['server/jobs/queue.ts', "import { sql } from 'drizzle-orm'"],
    ],
  },
  'wells, pumping tests and attachments are read through readable(viewer)': {
    bad: [
      ['server/api/wells/wells.repository.ts', 'export const list = (db: Db) => db.select().from(wells)'],
      [
        'server/api/a/a.repository.ts',
        'export const list = (db: Db) => db.select().from(x).innerJoin(pumpingTests, on)',
      ],
      [
        'server/api/a/a.repository.ts',
        'export const count = (db: Db) => db.execute(sql`select 1 from ${attachments}`)',
      ],
      [
        'server/api/a/a.repository.ts',
        "import { readable } from 'r'\nconst safe = (v: V) => readable.wells(v)\nexport const open = (db: Db) => db.select().from(wells)",
      ],
      [
        'server/api/a/a.repository.ts',
        '/** @everyRow short */\nexport const list = (db: Db) => db.select().from(wells)',
      ],
    ],
    good: [
      [
        'server/api/a/a.repository.ts',
        'const seen = (v: V) => readable.wells(v)\nexport const list = (db: Db, v: V) => db.select().from(wells).where(seen(v))',
      ],
      [
        'server/api/a/a.repository.ts',
        'const all = (db: Db) => db.select().from(wells)\nexport const list = (db: Db, v: V) => all(db).where(readable.wells(v))',
      ],
      [
        'server/api/a/a.repository.ts',
        '/** @everyRow The daily job lifts embargoes of all wells. */\nexport const list = (db: Db) => db.select().from(wells)',
      ],
      ['server/api/a/a.repository.ts', 'export const add = (db: Db) => db.insert(wells).values(row)'],
    ],
  },
  'what is written to wells is counted in the cells of the map': {
    bad: [
      ['server/api/wells/wells.repository.ts', 'export const add = (db: Db) => db.insert(wells).values(row)'],
      [
        'server/api/a/a.repository.ts',
        'const kept = (db: Db) => addToCells(db, all)\nexport const move = (db: Db) => db.update(wells).set(place)',
      ],
      ['server/jobs/a.ts', 'export const drop = (db: Db) => db.delete(wells).where(old)'],
    ],
    good: [
      [
        'server/api/a/a.repository.ts',
        'export const move = (db: Db) => recountingWells(db, ids, () => db.update(wells).set(place))',
      ],
      ['server/api/a/a.repository.ts', 'export const screens = (db: Db) => db.insert(wellScreens).values(rows)'],
    ],
  },
  'no file is longer than 400 lines': {
    bad: [['src/a.ts', 'let a\n'.repeat(401)]],
    good: [['src/a.ts', 'let a\n'.repeat(400)]],
  },
  'no component renders a string as HTML': {
    bad: [['src/components/A.vue', `<template><p v-${'html'}="name" /></template>`]],
    good: [['src/components/A.vue', '<template><p>{{ name }}</p></template>']],
  },
  'no test is held back': {
    bad: [
      ['it', 'skip'],
      ['test', 'only'],
      ['describe', 'concurrent', 'skip'],
      ['it', 'todo'],
      ['test', 'fixme'],
    ].map((call): Case => ['tests/shared/a.test.ts', `${call.join('.')}('fits', () => {})`]),
    good: [
      ['tests/shared/a.test.ts', "it.each([1])('fits', () => {})"],
      ['tests/shared/a.test.ts', `const source = "${['it', 'skip'].join('.')}('is read', () => {})"`],
    ],
  },
  'nothing refers to what is outside the project': {
    bad: [
      ['DEVELOPERS.md', `The reasons are in ../shared/${'design'}.`],
      ['server/a.ts', `// methods.${'md'} says why`],
      ['tests/a.ts', `const file = '/${'work'}/main/a.csv'`],
    ],
    good: [['server/a.ts', "import { a } from '../shared/numerics/bessel.ts'"]],
  },
  'compiler settings are in their places': {
    bad: [['tsconfig.build.json', '{}']],
    good: [['server/tsconfig.json', '{}']],
  },
}

describe('the checker', () => {
  it('has proof for every rule', () => expect(Object.keys(cases).sort()).toEqual(Object.keys(rules).sort()))

  for (const [rule, { bad, good }] of Object.entries(cases)) {
    it.each(bad)(`catches in %s what breaks: ${rule}`, (path, text) => {
      expect(broken(rule, [{ path, text }]).length).toBeGreaterThan(0)
    })
    it.each(good)(`lets pass in %s what keeps: ${rule}`, (path, text) => {
      expect(broken(rule, [{ path, text }])).toEqual([])
    })
  }

  it('finds stray entries at the top and leaves alone what git ignores', () => {
    const names = ['src', 'helpers', 'notes.md', 'dist', '.npmrc', 'package.json', 'start.log']
    expect(strayEntries(names, 'node_modules/\ndist/\n*.log\n')).toEqual(['helpers', 'notes.md'])
  })
})
