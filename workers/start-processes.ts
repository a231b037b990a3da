import { type ChildProcess, spawn } from 'node:child_process'
import { once } from 'node:events'
import { setTimeout as wait } from 'node:timers/promises'

/** A child ends when this process is gone, however it ended: it sees the channel between them close. */
const followParent = `data:text/javascript,${encodeURIComponent(
  'process.once("disconnect", () => process.exit(0)); process.channel?.unref()',
)}`
const mostRestarts = 5
const restartWindow = 60_000

/** A program that runs as long as this one does. */
export interface Companion {
  stop(): Promise<void>
}

interface CompanionOptions {
  name: string
  args: string[]
  env: NodeJS.ProcessEnv
  /** Show what it prints; its errors are always shown. */
  chatty: boolean
  /** It ended by itself too often in a minute. */
  onGiveUp: () => void
}

function launch({ args, env, chatty }: CompanionOptions): ChildProcess {
  return spawn(process.execPath, ['--import', followParent, ...args], {
    env,
    // A group of its own, so that Ctrl-C reaches only us and we stop it in order.
    detached: true,
    stdio: ['ignore', chatty ? 'inherit' : 'ignore', 'inherit', 'ipc'],
  })
}

async function end(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return
  const gone = once(child, 'exit')
  child.kill('SIGTERM')
  const late = new AbortController()
  await Promise.race([gone, wait(6000, undefined, { signal: late.signal }).catch(() => undefined)])
  late.abort()
  if (child.exitCode === null && child.signalCode === null) {
    child.kill('SIGKILL')
    await gone
  }
}

/** Starts a program under Node.js and starts it again when it ends by itself. */
export function keepRunning(options: CompanionOptions): Companion {
  let stopping = false
  let child = launch(options)
  const restarts: number[] = []
  const watch = () => {
    child.once('exit', (code, signal) => {
      if (stopping) return
      const now = Date.now()
      restarts.push(now)
      const recent = restarts.filter((time) => now - time < restartWindow).length
      console.error(`The ${options.name} ended (${signal ?? code}).`)
      if (recent > mostRestarts) return options.onGiveUp()
      setTimeout(() => {
        if (stopping) return
        child = launch(options)
        watch()
      }, 300)
    })
  }
  watch()
  return {
    stop: async () => {
      stopping = true
      await end(child)
    },
  }
}
