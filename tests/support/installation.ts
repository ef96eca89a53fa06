import { eventually, startCommand, type Command } from './commands.ts'
import { builtClient } from './built-client.ts'

export interface Installation extends Command {
  address: string
  /** What the application answers at a path, or null while nobody does. */
  status(path: string): Promise<number | null>
}

/** `npm start` on a data folder and a free port, until it says that it is ready. */
export async function startInstallation(dataDir: string, env: NodeJS.ProcessEnv = {}): Promise<Installation> {
  const settings = { DATA_DIR: dataDir, CLIENT_DIR: await builtClient(), DEMO: '0', PORT: '0', LOG_LEVEL: 'warn' }
  const command = startCommand('start', [], { ...settings, ...env })
  let over = false
  void command.ended.then(() => (over = true))
  const address = await eventually(async () => {
    if (over) throw new Error(`npm start ended:\n${command.output()}`)
    return /ready at (\S+) after/.exec(command.output())?.[1]
  }, 90_000)
  const status = (path: string) =>
    fetch(address + path).then(
      (answer) => answer.status,
      () => null,
    )
  return { ...command, address, status }
}

export async function stopInstallation({ child, ended }: Command): Promise<number | NodeJS.Signals | null> {
  child.kill('SIGTERM')
  return ended
}
