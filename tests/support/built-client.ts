import { buildClient } from '../../server/setup/client-build.mjs'
import { inRoot } from '../../server/setup/places.mjs'

/** The pages built from the sources as they are, apart from those that a running installation serves. */
export async function builtClient(): Promise<string> {
  const folder = inRoot('.cache/test-client')
  await buildClient(folder)
  return folder
}
