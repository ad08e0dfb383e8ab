import { readTable } from './read-table.ts'

/** Reads tables beside the page, so that it stays alive. */
addEventListener('message', ({ data }: MessageEvent<{ bytes: Uint8Array; name: string }>) => {
  void readTable(data.bytes, data.name).then((table) => postMessage(table))
})
