import PgBoss from 'pg-boss'
import { appDatabase } from '#app/server/db.server.ts'
import { type Mail, mailSchema } from '#app/server/outside/mail.server.ts'
import { mailQueue } from '#drizzle/queue.ts'

/** Puts work into the queue with the application's role; never works on it, supervises or migrates it. */
const queue = new PgBoss({
  db: {
    executeSql: async (text, values) => {
      const { rows } = await appDatabase.$client.query(text, values)
      return { rows }
    },
  },
  migrate: false,
  supervise: false,
  schedule: false,
})
queue.on('error', (problem) => console.error(`Queue: ${problem.message}`))

/** Leaves a letter for the job worker, which tries for an hour. */
export async function queueMail(mail: Mail): Promise<void> {
  await queue.send(mailQueue, mailSchema.parse(mail), {
    singletonKey: mail.key,
    retryLimit: 8,
    retryDelay: 5,
    retryBackoff: true,
    expireInSeconds: 60,
  })
}
