/**
 * How long a drag takes from the pointer's event to the painted frame, on site A, variant 3, in Chromium against a
 * running server: `BASE=http://127.0.0.1:3000 node --import tsx tests/bench/drag.ts`. The seats' figures are part of
 * the frame. Prints the median, p95 and the longest, and ends with 1 when p95 is over 50 ms.
 */
import { chromium } from '@playwright/test'
import { spread, takeWatched, watchFrames } from '#tests/bench/watch-frames.ts'

const base = process.env['BASE'] ?? 'http://127.0.0.1:3000'
const limit = 50
const rounds = Number(process.env['ROUNDS'] ?? 4)
const steps = 60

const browser = await chromium.launch({
  executablePath: '/usr/bin/chromium',
  args: ['--no-sandbox', '--disable-dev-shm-usage'],
})
const context = await browser.newContext({ viewport: { width: 1440, height: 900 } })
const page = await context.newPage()
await page.goto(`${base}/sign-in`)
await page.fill('[name=email]', 'designer@inglefield.test')
await page.fill('[name=password]', 'warm-terrace-demo')
await Promise.all([page.waitForURL('**/jobs**'), page.click('button[type=submit]')])

interface Listed {
  readonly id: string
  readonly name?: string
  readonly number?: number
}
const list = async (path: string, key: string): Promise<Listed[]> =>
  (await (await context.request.get(base + path)).json())[key]
const job = (await list('/api/jobs', 'jobs')).find(({ name }) => name?.startsWith('The Tansy Weir'))
const variant = (await list(`/api/jobs/${job?.id}/variants`, 'variants')).find(({ number }) => number === 3)
await page.goto(`${base}/jobs/${job?.id}/variants/${variant?.id}`)
await page.waitForSelector('[data-heater="H5"]')
await page.waitForTimeout(2500)

await watchFrames(page)

const figures = () => page.locator('[data-seat] text').allTextContents()
let changed = 0
for (let round = 0; round < rounds; round += 1) {
  const bar = await page.locator('[data-heater="H5"] rect').first().boundingBox()
  if (!bar) throw new Error('no heater to drag')
  const [x, y] = [bar.x + bar.width / 2, bar.y + bar.height / 2]
  await page.mouse.move(x, y)
  await page.mouse.down()
  const before = (await figures()).join()
  for (let step = 1; step <= steps; step += 1) {
    await page.mouse.move(x + Math.sin(step / 9) * 160, y + Math.sin(step / 5) * 40)
    await page.waitForTimeout(25)
  }
  if ((await figures()).join() !== before) changed += 1
  await page.keyboard.press('Escape')
  await page.mouse.up()
  await page.waitForTimeout(400)
}
const { steps: times } = await takeWatched(page)
await browser.close()

const { p95, words } = spread(times)
console.log(`drag, ${times.length} steps: ${words}; seats' figures followed in ${changed} of ${rounds} drags`)
if (changed < rounds || !(p95 <= limit)) process.exitCode = 1
