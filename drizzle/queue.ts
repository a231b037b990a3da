import { Client } from 'pg'
import PgBoss from 'pg-boss'

/** Name of the queue of letters. */
export const mailQueue = 'mail'
/** Name of the queue that is asked each hour to sweep what is no longer needed. */
export const sweepQueue = 'sweep'

/** Makes or renews the queue's schema as its owner and lets the application's role put work in, nothing more. */
export async function prepareQueue(ownerUrl: string): Promise<void> {
  const boss = new PgBoss({ connectionString: ownerUrl, max: 2, supervise: false, schedule: false })
  boss.on('error', (problem) => console.error(`Queue: ${problem.message}`))
  await boss.start()
  for (const name of [mailQueue, sweepQueue]) await boss.createQueue(name)
  await boss.stop({ graceful: false })
  const client = new Client({ connectionString: ownerUrl })
  await client.connect()
  try {
    await client.query('grant usage on schema pgboss to inglefield_app')
    await client.query('grant insert, select (id) on pgboss.job to inglefield_app')
    await client.query('grant select on pgboss.queue to inglefield_app')
  } finally {
    await client.end()
  }
}
