import { createReadStream } from 'node:fs'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { Readable } from 'node:stream'
import { logBug } from './log'

export interface TemporaryFile {
  readonly path: string
  /** The file as a response body; it is removed when read to the end, or when the reader goes away. */
  stream(): ReadableStream
  remove(): Promise<void>
}

/** A place for one file in a folder of its own that only this user may read. */
export async function temporaryFile(name: string): Promise<TemporaryFile> {
  const folder = await mkdtemp(join(tmpdir(), 'panewright-'))
  const path = join(folder, name)
  const remove = () => rm(folder, { recursive: true, force: true })
  return {
    path,
    remove,
    stream() {
      const file = createReadStream(path)
      file.once('close', () => {
        remove().catch((error: unknown) => logBug('temporary file not removed', error))
      })
      return Readable.toWeb(file) as ReadableStream
    },
  }
}
