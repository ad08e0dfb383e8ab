import { timingSafeEqual } from 'node:crypto'
import http from 'node:http'
import S3rver from 's3rver'
import Account from 's3rver/lib/models/account.js'

// The local stand-in for an S3 service, in a process of its own: told by its environment where to keep files and for whom, it
// tells the process that started it (object-store.mjs) which port it got, and ends with it (follow-parent.mjs).

const { OBJECTS_FOLDER: directory = '', S3_BUCKET: bucket = '', S3_ACCESS_KEY: accessKey = '', S3_SECRET_KEY: secretKey = '' } = process.env

Account.DUMMY_ACCOUNT.revokeAccessKey('S3RVER')
Account.DUMMY_ACCOUNT.createKeyPair(accessKey, secretKey)
const store = new S3rver({ directory, silent: true, vhostBuckets: false, configureBuckets: [{ name: bucket, configs: [] }] })
await store.configureBuckets()
const handle = store.callback()

/** The stand-in lets callers in without a signature and does not check newer ones: the generated key's name is the password. @param {string | undefined} header */
function isOurs(header) {
  const given = Buffer.from(/Credential=([^/,\s]+)\//.exec(header ?? '')?.[1] ?? '')
  const wanted = Buffer.from(accessKey)
  return given.length === wanted.length && timingSafeEqual(given, wanted)
}

const server = http.createServer((request, response) => {
  if (isOurs(request.headers.authorization)) void handle(request, response)
  else response.writeHead(403).end()
})
server.listen(0, '127.0.0.1', () => process.send?.(server.address()))
process.on('SIGTERM', () => {
  server.close(() => process.exit(0))
  server.closeAllConnections()
})
