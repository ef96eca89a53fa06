import { clientAndServerApart, clientDirection, serverLayers, sharedDirection } from './import-rules.ts'
import { sharedIsPure } from './purity-rules.ts'
import type { Rule } from './source-file.ts'
import { readsAreGuarded, sqlInRepositories, wellsAreCounted } from './sql-rules.ts'
import { everyTestRuns } from './test-rules.ts'
import { filesAreShort, noHtmlStrings, noWorkplace, settingsInPlace } from './text-rules.ts'

/** Every rule over the files of the project, by the claim it makes. */
export const rules: Record<string, Rule> = {
  'shared code imports in one direction': sharedDirection,
  'page and server never import each other': clientAndServerApart,
  'the page imports from api to views': clientDirection,
  'the server imports from repository to routes, and other resources through their service': serverLayers,
  'shared code is pure': sharedIsPure,
  'SQL stays in repositories': sqlInRepositories,
  'wells, pumping tests and attachments are read through readable(viewer)': readsAreGuarded,
  'what is written to wells is counted in the cells of the map': wellsAreCounted,
  'no file is longer than 400 lines': filesAreShort,
  'no component renders a string as HTML': noHtmlStrings,
  'no test is held back': everyTestRuns,
  'nothing refers to what is outside the project': noWorkplace,
  'compiler settings are in their places': settingsInPlace,
}
