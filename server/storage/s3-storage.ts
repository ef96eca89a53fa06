import { DeleteObjectCommand, GetObjectCommand, NoSuchKey, PutObjectCommand, S3Client } from '@aws-sdk/client-s3'
import type { Config } from '../config/config.ts'
import type { Storage } from './storage.ts'

/** An S3-compatible service; credentials come from the SDK's usual environment variables. */
export function s3Storage({ bucket, endpoint, region }: NonNullable<Config['s3']>): Storage {
  const client = new S3Client({ region, ...(endpoint ? { endpoint, forcePathStyle: true } : {}) })
  return {
    put: async (key, bytes) => void (await client.send(new PutObjectCommand({ Bucket: bucket, Key: key, Body: bytes }))),
    async get(key) {
      try {
        const { Body } = await client.send(new GetObjectCommand({ Bucket: bucket, Key: key }))
        return (await Body?.transformToByteArray()) ?? null
      } catch (error) {
        if (error instanceof NoSuchKey) return null
        throw error
      }
    },
    remove: async (key) => void (await client.send(new DeleteObjectCommand({ Bucket: bucket, Key: key }))),
  }
}
