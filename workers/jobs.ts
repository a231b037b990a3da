import { closeDatabase } from '#app/server/db.server.ts'
import { startWork } from '#app/server/jobs/work.server.ts'

const work = await startWork()

async function stop(): Promise<void> {
  await work.stop()
  await closeDatabase()
  process.exit(0)
}

for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => void stop())
