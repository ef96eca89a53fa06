import { rmSync } from 'node:fs'
import { builtClient } from './built-client.ts'
import { seededDataFolder } from './seeded-database.ts'

// What the browser tests start from takes one core for a minute: done beside the compilers, it does not hold them up.
await builtClient()
rmSync(await seededDataFolder(), { recursive: true, force: true })
