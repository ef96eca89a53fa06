/** Files by key: a folder by default, an S3-compatible service in production. */
export interface Storage {
  put(key: string, bytes: Uint8Array): Promise<void>
  /** Null when there is no such key. */
  get(key: string): Promise<Uint8Array | null>
  remove(key: string): Promise<void>
}
