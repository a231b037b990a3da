import { spawnSync } from 'node:child_process'
import { createHash } from 'node:crypto'
import { existsSync, mkdirSync, readFileSync, readdirSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { StartProblem } from '#drizzle/postgres-binaries.ts'
import { withStartLock } from '#drizzle/start-lock.ts'

const sources = [
  'app',
  'drizzle',
  'workers',
  'public',
  'package-lock.json',
  'vite.config.ts',
  'react-router.config.ts',
  'tsconfig.json',
]
const stamp = 'build/sources.sha256'

function filesUnder(place: string): string[] {
  if (!existsSync(place)) return []
  if (path.extname(place) !== '' && !readdirSafely(place)) return [place]
  return (readdirSafely(place) ?? []).flatMap((entry) =>
    entry.isDirectory() ? filesUnder(path.join(place, entry.name)) : [path.join(place, entry.name)],
  )
}

function readdirSafely(place: string) {
  try {
    return readdirSync(place, { withFileTypes: true })
  } catch {
    return null
  }
}

/** SHA-256 over the names and contents of everything that the build reads. */
function hashOfSources(): string {
  const hash = createHash('sha256').update(process.version)
  for (const file of sources.flatMap(filesUnder).toSorted()) hash.update(`\n${file}\n`).update(readFileSync(file))
  return hash.digest('hex')
}

/** Builds when a source changed since the last build. True when it built. */
export async function buildWhenChanged(): Promise<boolean> {
  mkdirSync('.data', { recursive: true })
  return withStartLock('.data/build.lock', async () => {
    const hash = hashOfSources()
    if (existsSync(stamp) && readFileSync(stamp, 'utf8') === hash && existsSync('build/server/index.js')) return false
    console.log('Building …')
    const built = spawnSync(process.execPath, ['node_modules/@react-router/dev/bin.js', 'build'], {
      encoding: 'utf8',
      env: { ...process.env, NODE_ENV: 'production', NO_COLOR: '1', FORCE_COLOR: '0' },
    })
    if (built.status !== 0) throw new StartProblem(`The build failed:\n${built.stderr.slice(-3000)}`)
    writeFileSync(stamp, hash)
    return true
  })
}
