/**
 * How long a drag takes from the pointer's event to the painted frame, on site A, variant 3, in Chromium against a
 * running server: `BASE=http://127.0.0.1:3000 node --import tsx tests/bench/drag.ts`. The seats' figures are part of
 * the frame. Prints the median, p95 and the longest, and ends with 1 when p95 is over 50 ms.
 */
import { chromium } from '@playwright/test'
import { watchFrames } from '#tests/bench/watch-frames.ts'

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
const times = await page.evaluate(() => {
  const found: unknown = Reflect.get(globalThis, 'dragTimes')
  return Array.isArray(found) ? found.map(Number) : []
})
await browser.close()

const sorted = times.toSorted((a, b) => a - b)
const at = (part: number) => sorted[Math.min(sorted.length - 1, Math.floor(part * sorted.length))] ?? Number.NaN
const text = (ms: number) => `${ms.toFixed(1)} ms`
console.log(
  `drag, ${times.length} steps: median ${text(at(0.5))}, p95 ${text(at(0.95))}, longest ${text(at(1))}; ` +
    `seats' figures followed in ${changed} of ${rounds} drags`,
)
if (changed < rounds || !(at(0.95) <= limit)) process.exitCode = 1
