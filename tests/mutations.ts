import { spawnSync } from 'node:child_process'
import { cpSync, mkdtempSync, readFileSync, rmSync, symlinkSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { z } from 'zod'
import { comfortMutations, type Mutation } from '#tests/mutations-comfort.ts'
import { fluxMutations } from '#tests/mutations-flux.ts'

/**
 * Breaks one formula at a time and expects a named test to fail: `node --import tsx tests/mutations.ts [part of a file's
 * path]`. It works on a copy of the project in the temporary folder, so nothing is left behind when it is stopped.
 */
const root = join(dirname(fileURLToPath(import.meta.url)), '..')
const copied = ['app', 'drizzle', 'tests', 'workers', 'package.json', 'tsconfig.json', 'vitest.config.ts']
const report = z.object({
  numFailedTests: z.number(),
  numPassedTests: z.number(),
  testResults: z.array(z.object({ assertionResults: z.array(z.object({ status: z.string(), fullName: z.string() })) })),
})

/** What a test file came to: how many tests passed and the names of those that failed. */
interface Outcome {
  readonly passed: number
  readonly failed: readonly string[]
}

function copyOfProject(): string {
  const folder = mkdtempSync(join(tmpdir(), 'mutations-'))
  for (const name of copied) cpSync(join(root, name), join(folder, name), { recursive: true })
  symlinkSync(join(root, 'node_modules'), join(folder, 'node_modules'))
  return folder
}

function outcomeOf(folder: string, test: string): Outcome {
  const output = join(folder, 'outcome.json')
  rmSync(output, { force: true })
  const vitest = join(folder, 'node_modules', 'vitest', 'vitest.mjs')
  const run = ['run', test, '--reporter=json', `--outputFile=${output}`]
  const { status, stderr } = spawnSync(process.execPath, [vitest, ...run], {
    cwd: folder,
    encoding: 'utf8',
    timeout: 600_000,
  })
  try {
    const { numPassedTests, testResults } = report.parse(JSON.parse(readFileSync(output, 'utf8')))
    const failed = testResults.flatMap((file) => file.assertionResults.filter((each) => each.status === 'failed'))
    return { passed: numPassedTests, failed: failed.map(({ fullName }) => fullName) }
  } catch {
    throw new Error(`${test} did not run (${status}): ${stderr.slice(0, 400)}`)
  }
}

/** Null when the mutation is noticed as it should be, else what is wrong. */
function verdictOf(folder: string, { file, from, to, test }: Mutation): string | null {
  const path = join(folder, file)
  const text = readFileSync(path, 'utf8')
  if (!text.includes(from)) return `its place is not in ${file} any more`
  writeFileSync(
    path,
    text.replace(from, () => to),
  )
  try {
    const { failed } = outcomeOf(folder, test)
    if (failed.length === 0) return `no test of ${test} fails`
    console.log(
      `noticed  ${file}: ${from}  →  ${to}\n         by ${failed[0]}${failed.length > 1 ? ` and ${failed.length - 1} more` : ''}`,
    )
    return null
  } finally {
    writeFileSync(path, text)
  }
}

function main(): void {
  const wanted = process.argv[2] ?? ''
  const mutations = [...fluxMutations, ...comfortMutations].filter(({ file }) => file.includes(wanted))
  const folder = copyOfProject()
  const stop = () => {
    rmSync(folder, { recursive: true, force: true })
    process.exit(1)
  }
  process.on('SIGINT', stop)
  process.on('SIGTERM', stop)
  let missed = 0
  try {
    for (const test of new Set(mutations.map((mutation) => mutation.test))) {
      const { passed, failed } = outcomeOf(folder, test)
      if (passed === 0 || failed.length > 0)
        throw new Error(`${test} must pass before anything is broken: ${failed.join('; ')}`)
    }
    for (const mutation of mutations) {
      const wrong = verdictOf(folder, mutation)
      if (wrong === null) continue
      missed++
      console.log(`MISSED   ${mutation.file}: ${mutation.from}  →  ${mutation.to}\n         ${wrong}`)
    }
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
  console.log(`${mutations.length - missed} noticed, ${missed} missed`)
  process.exitCode = missed === 0 ? 0 : 1
}

main()
