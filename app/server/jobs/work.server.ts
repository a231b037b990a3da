import PgBoss from 'pg-boss'
import { z } from 'zod'
import { poolOf } from '#app/server/db.server.ts'
import { sweepPhotos } from '#app/server/jobs/sweep-photos.server.ts'
import { sweep } from '#app/server/jobs/sweep.server.ts'
import { mailSchema, post } from '#app/server/outside/mail.server.ts'
import { mailQueue, sweepQueue } from '#drizzle/queue.ts'

const ownerUrlSchema = z.string().startsWith('postgres')

/** Letters leave one by one; the same key twice is the same letter, so a second try does no harm. */
async function deliverMail(jobs: PgBoss.Job<unknown>[]): Promise<void> {
  for (const { data } of jobs) await post.deliver(mailSchema.parse(data))
}

/** Starts working on everything in the queue as the database's owner role; `stop` lets the work in hand finish. */
export async function startWork(): Promise<{ stop(): Promise<void> }> {
  const pool = poolOf(ownerUrlSchema.parse(process.env.DATABASE_OWNER_URL), 'inglefield jobs', 3)
  const boss = new PgBoss({
    db: {
      executeSql: async (text, values) => {
        const { rows } = await pool.query(text, values)
        return { rows }
      },
    },
    migrate: false,
    // A letter may hold a link that is good for half an hour: it does not stay long.
    archiveCompletedAfterSeconds: 60,
    deleteAfterHours: 1,
  })
  boss.on('error', (problem) => console.error(`Queue: ${problem.message}`))
  await boss.start()
  await boss.work(mailQueue, { pollingIntervalSeconds: 1 }, deliverMail)
  await boss.work(sweepQueue, async () => {
    await sweep(pool)
    await sweepPhotos(pool)
  })
  await boss.schedule(sweepQueue, '17 * * * *')
  return {
    stop: async () => {
      await boss.stop({ graceful: true, timeout: 8000 })
      await pool.end()
    },
  }
}
