import { expect, test } from '@playwright/test'
import { PNG } from 'pngjs'
import { z } from 'zod'
import { photoMarksSchema } from '#app/domain/photo/measurements.ts'
import { apart, fingers, middleOf, type Place } from '#tests/support/fingers.ts'
import { openJob, readJob, signIn, type JourneyJob } from '#tests/support/journey.ts'

test.use({ hasTouch: true, viewport: { width: 1024, height: 768 } })

test('a site is changed by finger: a seat, an umbrella and a corner move; two fingers enlarge and shift', async ({
  page,
}) => {
  await signIn(page, 'designer')
  await openJob(page, 'Changed by finger')
  // 12 × 5 m with three umbrellas, a table for four under each.
  await page.getByRole('radio', { name: /^Terrace with umbrellas/ }).tap()
  await page.getByRole('button', { name: 'Start the site' }).tap()
  const read = async () => (await readJob(page.request, /^Changed by finger/)).site
  const plan = page.getByRole('application')
  const seat = page.locator('[data-seat="U1-1"]')
  const [first, third] = [page.locator('[data-table="U1"]'), page.locator('[data-table="U3"]')]
  await expect(seat).toBeVisible()
  await expect.poll(async () => (await read()).seats.length).toBe(12)
  const before = await read()
  const position = (site: JourneyJob['site'], id: string) => site.seats.find((each) => each.id === id)!
  /** px of the screen to a metre: the outer tables stand 8 m apart. */
  const scale = async () => apart(await middleOf(first), await middleOf(third)) / 8

  const [x, y] = await middleOf(seat)
  const px = await scale()
  await fingers(page, [[x, y], [x + 70, y - 20]]) // prettier-ignore
  await expect.poll(async () => position(await read(), 'U1-1').x).toBeGreaterThan(position(before, 'U1-1').x)
  const moved = position(await read(), 'U1-1')
  expect(moved.x - position(before, 'U1-1').x).toBeCloseTo(70 / px, 1)
  expect(moved.y - position(before, 'U1-1').y).toBeCloseTo(20 / px, 1)
  await expect(page.getByText(/^Placed by hand, ± 0\.025 m from now on: length, x and 2 more sizes/)).toBeVisible()
  expect((await read()).seats.filter((each) => each.id !== 'U1-1')).toEqual(
    before.seats.filter((each) => each.id !== 'U1-1'),
  )

  const [ux, uy] = await middleOf(page.locator('[data-obstacle="umbrella-3"]'))
  const rim: Place = [ux + 1.3 * px, uy]
  await fingers(page, [rim, [rim[0] - 60, rim[1]]])
  const umbrella = async () => (await read()).obstacles[2]!.shape
  await expect.poll(umbrella).not.toEqual(before.obstacles[2]!.shape)
  expect(await umbrella()).toMatchObject({ radius: 1.5, centre: [expect.closeTo(10 - 60 / px, 1), 2.5] })

  await page.getByRole('tab', { name: /^Floor/ }).tap()
  const corner = await middleOf(plan.locator('rect[width="10"]').nth(2))
  await fingers(page, [corner, [corner[0] - 50, corner[1] + 30]])
  await expect.poll(async () => (await read()).floor[2]).not.toEqual([12, 5])
  const floor = (await read()).floor
  expect(floor[2]).toEqual([expect.closeTo(12 - 50 / px, 1), expect.closeTo(5 - 30 / px, 1)])
  expect(floor.toSpliced(2, 1)).toEqual(before.floor.toSpliced(2, 1))

  // Each drag is one step.
  for (let drags = 0; drags < 3; drags++) await page.getByRole('button', { name: 'Undo' }).first().tap()
  await expect.poll(read).toEqual(before)

  const [cx, cy] = await middleOf(plan.locator('..').locator('..'))
  await fingers(page, [[cx - 60, cy - 40], [cx - 150, cy - 100]], [[cx + 60, cy + 40], [cx + 150, cy + 100]]) // prettier-ignore
  await expect.poll(scale).toBeCloseTo(2.5 * px, -1)
  const [larger, shown] = [await scale(), await middleOf(first)]
  await fingers(page, [[cx - 60, cy - 60], [cx + 40, cy - 80]], [[cx + 60, cy - 60], [cx + 160, cy - 80]]) // prettier-ignore
  await expect.poll(async () => (await middleOf(first))[0] - shown[0]).toBeCloseTo(100, 0)
  expect((await middleOf(first))[1] - shown[1]).toBeCloseTo(-20, 0)
  expect(await scale()).toBeCloseTo(larger, 0)

  // Two fingers are no step: what was undone can still be done again.
  await expect(page.getByRole('button', { name: 'Redo' }).first()).toBeEnabled()
})

/** A white picture, to be marked anywhere. */
function whitePicture(width: number, height: number): Buffer {
  const png = new PNG({ width, height })
  png.data.fill(255)
  return PNG.sync.write(png)
}

test('four corners are marked in a photo by finger, one is moved, and all are kept over a reload', async ({ page }) => {
  await signIn(page, 'designer')
  await openJob(page, 'Measured by finger')
  await page.getByRole('link', { name: 'Photos' }).tap()
  const file = { name: 'wall.png', mimeType: 'image/png', buffer: whitePicture(1200, 900) }
  await page.getByLabel('Photos, or a plan as PDF').setInputFiles(file)
  await page.getByRole('button', { name: 'Add', exact: true }).tap()
  await page.getByRole('link', { name: /^wall/ }).tap()
  await page.waitForURL(/photos\/[0-9a-f-]+$/)
  const address = `/api/photos/${page.url().split('/').at(-1)}`
  const answer = z.object({ marks: photoMarksSchema })
  const planes = async () => answer.parse(await (await page.request.get(address)).json()).marks.planes

  const fill = async (label: string, text: string) => {
    await page.getByLabel(label, { exact: true }).last().fill(text)
    await page.getByLabel(label, { exact: true }).last().blur()
  }
  await fill('Name', 'Door')
  await fill('First side', '900')
  await fill('Second side', '2000')
  await page.getByRole('button', { name: 'Mark its four corners' }).tap()

  const photo = page.getByRole('application')
  await photo.scrollIntoViewIfNeeded()
  const box = (await photo.locator('img').boundingBox())!
  const px = box.width / 1200
  const place = ([x, y]: Place): Place => [box.x + x * px, box.y + y * px]
  const wanted: Place[] = [[300, 700], [800, 720], [780, 200], [320, 180]] // prettier-ignore
  for (const [i, at] of wanted.entries()) {
    await expect(page.getByText(`Mark ${i + 1} of 4`)).toBeVisible()
    const [x, y] = place(at)
    await fingers(page, [[x - 15, y - 15], [x, y]]) // prettier-ignore
  }
  await expect.poll(async () => (await planes()).length).toBe(1)
  const within = async (corners: readonly Place[]) => {
    const kept = (await planes())[0]!.corners
    for (const [i, [x, y]] of kept.entries()) expect(apart([x, y], corners[i]!), `corner ${i + 1}`).toBeLessThan(2)
  }
  await within(wanted)

  await page.reload()
  await expect(photo.locator('[data-mark]')).toHaveCount(4)
  const [from, to] = [place([780, 200]), place([850, 240])]
  // The finger takes hold beside the mark, so as to see it.
  await fingers(page, [[from[0] + 10, from[1] + 10], [to[0] + 10, to[1] + 10]]) // prettier-ignore
  const after = wanted.with(2, [850, 240])
  await expect.poll(async () => (await planes())[0]!.corners[2][0]).toBeGreaterThan(800)
  await within(after)

  const mark = (path: string) => middleOf(photo.locator(`[data-mark="planes.0.corners.${path}"]`))
  const wide = apart(await mark('0'), await mark('1'))
  const [cx, cy] = place([600, 450])
  await fingers(page, [[cx - 50, cy], [cx - 100, cy]], [[cx + 50, cy], [cx + 100, cy]]) // prettier-ignore
  await expect.poll(async () => apart(await mark('0'), await mark('1'))).toBeCloseTo(2 * wide, -1)
  await page.reload()
  await expect(photo.locator('[data-mark]')).toHaveCount(4)
  await within(after)
})
