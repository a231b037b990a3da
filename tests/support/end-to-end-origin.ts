import { createHash } from 'node:crypto'
import path from 'node:path'
import { fileURLToPath } from 'node:url'

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..')
const port = Number(
  process.env.E2E_PORT || 20_000 + (createHash('sha1').update(root).digest().readUInt16BE(0) % 10_000),
)

/** Where the end-to-end tests find the built application: a port of this checkout's own. */
export const endToEndOrigin = `http://127.0.0.1:${port}`
