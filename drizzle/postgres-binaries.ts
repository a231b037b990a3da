import { spawnSync } from 'node:child_process'
import { existsSync, mkdirSync, readdirSync, writeFileSync } from 'node:fs'
import path from 'node:path'

/** Something the person at the terminal can put right: the message is the whole sentence to show. */
export class StartProblem extends Error {}

export const isRoot = process.getuid?.() === 0
const debianFolder = '/usr/lib/postgresql'
const installCommand = 'sudo apt-get update && sudo apt-get install -y --no-install-recommends postgresql'
/** Often not on the search path of a plain shell. */
const runuser = ['/usr/sbin/runuser', '/sbin/runuser'].find((file) => existsSync(file)) ?? 'runuser'

interface Outcome {
  ok: boolean
  output: string
}

/** Runs a program to its end. `quiet` cuts its output off, for programs whose children outlive them. */
export function run(program: string, args: string[], options: { quiet?: boolean } = {}): Outcome {
  const result = spawnSync(program, args, {
    encoding: 'utf8',
    cwd: '/',
    env: { ...process.env, LC_ALL: 'C.UTF-8', DEBIAN_FRONTEND: 'noninteractive' },
    stdio: options.quiet ? 'ignore' : ['ignore', 'pipe', 'pipe'],
  })
  return {
    ok: result.status === 0,
    output: `${result.stdout ?? ''}${result.stderr ?? ''}${result.error?.message ?? ''}`,
  }
}

/** Runs a server program as the account that may run it: root hands over to Debian's `postgres`. */
export function runAsServer(program: string, args: string[], options: { quiet?: boolean } = {}): Outcome {
  return isRoot ? run(runuser, ['-u', 'postgres', '--', program, ...args], options) : run(program, args, options)
}

function findBinaries(): string | null {
  if (!existsSync(debianFolder)) return null
  const versions = readdirSync(debianFolder)
    .filter((version) => existsSync(path.join(debianFolder, version, 'bin/initdb')))
    .sort((a, b) => Number(b) - Number(a))
  return versions[0] ? path.join(debianFolder, versions[0], 'bin') : null
}

/**
 * Folder of PostgreSQL's server programs. Installs Debian's package when it is missing and we are root, without the
 * cluster that the package would otherwise make and start.
 */
export function postgresBinaries(): string {
  const found = findBinaries()
  if (found) return found
  if (!isRoot) {
    throw new StartProblem(`PostgreSQL is not installed. Install it, then start again:\n  ${installCommand}`)
  }
  console.log('PostgreSQL is not installed: installing the package postgresql …')
  const settings = '/etc/postgresql-common/createcluster.conf'
  mkdirSync(path.dirname(settings), { recursive: true })
  if (!existsSync(settings)) writeFileSync(settings, 'create_main_cluster = false\n')
  run('apt-get', ['update', '-qq'])
  const installed = run('apt-get', ['install', '-y', '-qq', '--no-install-recommends', 'postgresql'])
  const binaries = findBinaries()
  if (!binaries) {
    throw new StartProblem(
      `PostgreSQL could not be installed. Run this by hand and read what it says:\n  ${installCommand}\n${installed.output.slice(-600)}`,
    )
  }
  return binaries
}
