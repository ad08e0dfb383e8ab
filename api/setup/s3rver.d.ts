// The parts of s3rver that api/setup uses; it brings no types of its own.

declare module 's3rver' {
  import type { IncomingMessage, ServerResponse } from 'node:http'

  interface Options {
    readonly directory: string
    readonly silent: boolean
    readonly vhostBuckets: boolean
    readonly configureBuckets: readonly { readonly name: string; readonly configs: readonly string[] }[]
  }
  const S3rver: new (options: Options) => {
    configureBuckets(): Promise<unknown>
    callback(): (request: IncomingMessage, response: ServerResponse) => Promise<void>
  }
  export = S3rver
}

declare module 's3rver/lib/models/account.js' {
  interface Account {
    createKeyPair(id: string, secret: string): void
    revokeAccessKey(id: string): void
  }
  const accounts: { readonly DUMMY_ACCOUNT: Account }
  export = accounts
}
