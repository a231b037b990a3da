import { spawnSync } from 'node:child_process'
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs'
import path from 'node:path'
import { fileURLToPath } from 'node:url'
import { z } from 'zod'
import { isRoot, run } from '#drizzle/postgres-binaries.ts'
import { startLocalDatabase, stopLocalDatabase, withAdmin } from '#drizzle/local-database.ts'
import { buildWhenChanged } from '#workers/start-build.ts'

process.chdir(path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..'))
const results = 'test-results'
const chromium = '/usr/bin/chromium'

interface Count {
  passed: number
  failed: number
}

function node(script: string, args: string[], env: NodeJS.ProcessEnv = {}): boolean {
  const ended = spawnSync(process.execPath, [`node_modules/${script}`, ...args], {
    stdio: 'inherit',
    env: { ...process.env, ...env },
  })
  return ended.status === 0
}

const binaries = {
  prettier: 'prettier/bin/prettier.cjs',
  eslint: 'eslint/bin/eslint.js',
  typegen: '@react-router/dev/bin.js',
  tsc: 'typescript/bin/tsc',
  knip: 'knip/bin/knip.js',
  vitest: 'vitest/vitest.mjs',
  playwright: '@playwright/test/cli.js',
}

/** Checks that pass or fail as a whole; only their failures are counted. */
const wholeChecks: { name: string; check: () => boolean | Promise<boolean> }[] = [
  { name: 'formatting', check: () => node(binaries.prettier, ['--check', '--log-level', 'warn', '.']) },
  { name: 'lint', check: () => node(binaries.eslint, ['--max-warnings', '0', '.']) },
  { name: 'types', check: () => node(binaries.typegen, ['typegen']) && node(binaries.tsc, []) },
  { name: 'unused code', check: () => node(binaries.knip, []) },
]

const vitestSchema = z.object({ numPassedTests: z.number(), numFailedTests: z.number(), success: z.boolean() })
const playwrightSchema = z.object({
  stats: z.object({ expected: z.number(), unexpected: z.number(), flaky: z.number() }),
})

function read<T>(file: string, schema: z.ZodType<T>): T | null {
  return existsSync(file) ? schema.parse(JSON.parse(readFileSync(file, 'utf8'))) : null
}

/** A runner that ended badly without naming a failed test still failed. */
const atLeastOne = (ok: boolean, count: Count): Count => ({
  ...count,
  failed: ok ? count.failed : Math.max(1, count.failed),
})

function unitTests(): Count {
  const file = `${results}/vitest.json`
  const ok = node(binaries.vitest, ['run', '--reporter=dot', '--reporter=json', `--outputFile.json=${file}`], {
    NODE_ENV: 'test',
  })
  const outcome = read(file, vitestSchema)
  return atLeastOne(ok && outcome?.success === true, {
    passed: outcome?.numPassedTests ?? 0,
    failed: outcome?.numFailedTests ?? 0,
  })
}

/** Debian's Chromium; installed when it is missing and we may. */
function ensureChromium(): void {
  if (existsSync(chromium)) return
  const command = 'apt-get update && apt-get install -y --no-install-recommends chromium fonts-liberation'
  if (!isRoot) throw new Error(`Chromium is not installed. Install it, then test again:\n  sudo sh -c '${command}'`)
  console.log('Chromium is not installed: installing the package chromium …')
  const installed = run('sh', ['-c', command])
  if (!existsSync(chromium)) throw new Error(`Chromium could not be installed:\n${installed.output.slice(-600)}`)
}

function endToEndTests(): Count {
  ensureChromium()
  const file = `${results}/playwright.json`
  const ok = node(binaries.playwright, ['test', '--reporter=line,json'], { PLAYWRIGHT_JSON_OUTPUT_NAME: file })
  const stats = read(file, playwrightSchema)?.stats
  return atLeastOne(ok && stats !== undefined, {
    passed: stats?.expected ?? 0,
    failed: (stats?.unexpected ?? 0) + (stats?.flaky ?? 0),
  })
}

async function part(name: string, work: () => Count | Promise<Count>): Promise<Count> {
  const begun = Date.now()
  console.log(`\n── ${name}`)
  let count: Count
  try {
    count = await work()
  } catch (problem) {
    console.error(problem instanceof Error ? problem.message : problem)
    count = { passed: 0, failed: 1 }
  }
  console.log(
    `── ${name}: ${count.failed === 0 ? 'passed' : 'FAILED'} in ${((Date.now() - begun) / 1000).toFixed(0)} s`,
  )
  return count
}

/** Stops the test cluster and leaves no test's database behind, unless another run of this checkout uses it. */
async function endTestCluster(): Promise<void> {
  const cluster = await startLocalDatabase('test')
  const used = await withAdmin(cluster.adminUrl(), async (admin) => {
    const others = await admin.query(`select 1 from pg_stat_activity where datname ~ '^(test|template)_'`)
    if (others.rowCount) return true
    const kept = await admin.query(`select datname from pg_database where datname ~ '^test_'`)
    for (const { datname } of kept.rows) await admin.query(`drop database ${admin.escapeIdentifier(datname)}`)
    return false
  })
  if (!used) await stopLocalDatabase('test')
}

rmSync(results, { recursive: true, force: true })
mkdirSync(results, { recursive: true })
const counts: Count[] = []
for (const { name, check } of wholeChecks) {
  counts.push(await part(name, async () => ({ passed: 0, failed: (await check()) ? 0 : 1 })))
}
counts.push(await part('unit, database and route tests', unitTests))
counts.push(await part('build', async () => ({ passed: 0, failed: (await buildWhenChanged(), 0) })))
counts.push(await part('end-to-end tests', endToEndTests))
await endTestCluster()
const passed = counts.reduce((sum, count) => sum + count.passed, 0)
const failed = counts.reduce((sum, count) => sum + count.failed, 0)
process.exitCode = failed === 0 ? 0 : 1
console.log(`${passed} passed, ${failed} failed`)
