import { join } from 'node:path'
import type { Config } from '../config/config.ts'
import { folderStorage } from './folder-storage.ts'
import type { Storage } from './storage.ts'

/** The S3 client is loaded only where it is used: it is large, and warns about old Node versions when loaded. */
export async function createStorage(config: Config): Promise<Storage> {
  if (!config.s3) return folderStorage(join(config.dataDir, 'storage'))
  process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED = 'true'
  const { s3Storage } = await import('./s3-storage.ts')
  return s3Storage(config.s3)
}
