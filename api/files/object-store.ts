import type { Readable } from 'node:stream'
import { GetObjectCommand, PutObjectCommand, S3Client } from '@aws-sdk/client-s3'
import type { Env } from '#api/env.ts'
import { unavailable } from '#api/errors.ts'

/** First and last byte, both included. */
export interface ByteRange {
  readonly start: number
  readonly end: number
}

/** Keeps the bytes of files under keys the server makes. There is no removal: a file that is withdrawn stays. */
export interface ObjectStore {
  /** false: every call is refused with what is missing (503) */
  readonly configured: boolean
  put(key: string, body: Buffer, contentType: string): Promise<void>
  /** The bytes as a stream, all of them or a range. */
  get(key: string, range?: ByteRange): Promise<Readable>
  close(): void
}

const CONNECT_WITHIN_MS = 3_000
const ANSWER_WITHIN_MS = 30_000

// The SDK of this version runs on Node 20 for good; its notice is about versions to come.
process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED ??= 'true'

const noStore = () => unavailable('This server has no store for photos and documents (S3_ENDPOINT is not set), so files can be neither kept nor shown. All else works.')
const storeAway = (cause: unknown) => unavailable('The store for photos and documents cannot be reached. Nothing was saved; try again in a minute.', cause)

/** The store of these settings; without S3_ENDPOINT one that says so at every call. */
export function createObjectStore(env: Env): ObjectStore {
  const { S3_ENDPOINT: endpoint, S3_BUCKET: Bucket, S3_ACCESS_KEY: accessKeyId, S3_SECRET_KEY: secretAccessKey } = env
  if (endpoint === undefined || Bucket === undefined || accessKeyId === undefined || secretAccessKey === undefined) {
    return { configured: false, put: () => Promise.reject(noStore()), get: () => Promise.reject(noStore()), close: () => undefined }
  }
  const client = new S3Client({
    endpoint,
    region: env.S3_REGION,
    forcePathStyle: env.S3_PATH_STYLE === '1',
    credentials: { accessKeyId, secretAccessKey },
    // Services other than Amazon's store the framing of the newer checksums inside the object.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    maxAttempts: 2,
    requestHandler: { connectionTimeout: CONNECT_WITHIN_MS, requestTimeout: ANSWER_WITHIN_MS },
  })
  return {
    configured: true,
    async put(Key, Body, ContentType) {
      await client.send(new PutObjectCommand({ Bucket, Key, Body, ContentType, ContentLength: Body.length })).catch((error: unknown) => {
        throw storeAway(error)
      })
    },
    async get(Key, range) {
      const Range = range === undefined ? undefined : `bytes=${range.start}-${range.end}`
      const { Body } = await client.send(new GetObjectCommand({ Bucket, Key, ...(Range === undefined ? {} : { Range }) })).catch((error: unknown) => {
        throw storeAway(error)
      })
      // in Node the SDK's bodies are streams of Node
      return Body as Readable
    },
    close: () => client.destroy(),
  }
}
