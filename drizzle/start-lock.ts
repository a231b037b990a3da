import { linkSync, readFileSync, renameSync, rmSync, unlinkSync, writeFileSync } from 'node:fs'
import { setTimeout as wait } from 'node:timers/promises'
import { StartProblem } from '#drizzle/postgres-binaries.ts'

const patience = 90_000

function isAlive(pid: number): boolean {
  if (!Number.isInteger(pid) || pid <= 0) return false
  try {
    process.kill(pid, 0)
    return true
  } catch (problem) {
    return problem instanceof Error && 'code' in problem && problem.code === 'EPERM'
  }
}

function holder(file: string): number | null {
  try {
    return Number(readFileSync(file, 'utf8'))
  } catch {
    return null
  }
}

/** Takes the lock away from a process that is gone; puts it back if somebody else was quicker. */
function takeFromTheDead(file: string, dead: number) {
  const aside = `${file}.${process.pid}`
  try {
    renameSync(file, aside)
    if (holder(aside) !== dead) linkSync(aside, file)
    rmSync(aside, { force: true })
  } catch {
    rmSync(aside, { force: true })
  }
}

function tryToTake(file: string): boolean {
  const own = `${file}.${process.pid}.own`
  writeFileSync(own, String(process.pid))
  try {
    // A link appears whole or not at all, so no reader sees a lock without its holder.
    linkSync(own, file)
    return true
  } catch {
    return false
  } finally {
    unlinkSync(own)
  }
}

/** Does the work while no other process of this computer does it with the same lock file. */
export async function withStartLock<T>(file: string, work: () => Promise<T>): Promise<T> {
  const giveUp = Date.now() + patience
  while (!tryToTake(file)) {
    const pid = holder(file)
    if (pid !== null && !isAlive(pid)) takeFromTheDead(file, pid)
    else if (Date.now() > giveUp) {
      throw new StartProblem(
        `Another start (process ${pid ?? '?'}) holds ${file}. Let it finish, or delete that file if no such process starts this application.`,
      )
    } else await wait(150)
  }
  try {
    return await work()
  } finally {
    rmSync(file, { force: true })
  }
}
