import { expect, test, type Locator, type Page } from '@playwright/test'
import { coverPlane, planeHeightAt } from '#app/domain/site/cover.ts'
import type { Obstacle, Site } from '#app/domain/site/site.ts'
import { openJob, readJob, signIn } from '#tests/support/journey.ts'

/** The most that a newcomer may need for the veranda of demo site C. */
const mostActions = 60

/**
 * Does what a hand does and counts it: a click is one action; so is typing a field, with going into it and leaving it;
 * so is one choice in a list; so is one key outside a field.
 */
class Hand {
  actions = 0
  constructor(readonly page: Page) {}

  async click(what: Locator): Promise<void> {
    this.actions += 1
    await what.click()
  }
  async type(label: string, text: string): Promise<void> {
    this.actions += 1
    const field = this.page.getByLabel(label, { exact: true })
    await field.fill(text)
    await field.press('Enter')
  }
  async pick(label: string, option: string): Promise<void> {
    this.actions += 1
    await this.page.getByLabel(label, { exact: true }).selectOption(option)
  }
  open = (kind: string) => this.click(this.page.getByRole('tab', { name: new RegExp(`^${kind}`) }))
  press = (name: string) => this.click(this.page.getByRole('button', { name, exact: true }))
}

test('a newcomer models the veranda of site C from its listed sizes', async ({ page }) => {
  await signIn(page, 'designer')
  await openJob(page, 'Newcomer veranda')
  const hand = new Hand(page)

  // The kind of place, with the sizes that were listed.
  await hand.click(page.getByRole('radio', { name: /^Veranda against a house wall/ }))
  await hand.type('Length along the wall, x', '7200')
  await hand.type('Depth from the wall, y', '3.1 m')
  await hand.type('Ceiling height at the wall', '2650')
  await hand.type('Ceiling height at the open edge', `8' 8 5/16"`)
  await hand.type('Joist spacing', '60 cm')
  await hand.press('Start the site')

  await hand.open('Covers')
  await hand.click(page.getByRole('button', { name: /^timber ceiling/ }))
  await hand.type('Void above', '205')

  await hand.open('Obstacles')
  const round = async (kind: string, x: string, y: string, across: string, foot: string, top: string) => {
    await hand.press(kind)
    await hand.type('Middle x', x)
    await hand.type('Middle y', y)
    await hand.type('Across', across)
    // From above: a top below the old foot is refused, so what hangs lower gets its foot first.
    if (kind === 'Lamp') await hand.type('Foot', foot)
    await hand.type('Top', top)
    if (kind !== 'Lamp') await hand.type('Foot', foot)
  }
  await round('Fan', '5.2', '1.55', '1.3', '2.33', '2.43')
  await round('Lamp', '2.6', '1.55', '45 cm', '1.65', '1.95')
  await hand.press('Blind')
  await hand.type('Top', '2.6')
  await hand.press('Door')
  await hand.type('To x', '4.72')
  await hand.type('From x', '3.9')
  await hand.type('From y', '0')
  await hand.type('To y', '0.82')
  await hand.type('Top', '2040')

  await hand.open('Tables')
  await hand.press('Table')
  await hand.type('Middle x', '2.6')
  await hand.type('Long', '2.4')
  await hand.type('Deep', '0.9')
  await hand.type('Along it, lower side', '4')
  await hand.type('Along it, upper side', '4')
  await hand.type('From the edge', '270')
  await hand.type('Group', 'T')
  await hand.press('Set 8 seats')

  await hand.press('Seats in rows')
  await hand.type('First seat x', '5.85')
  await hand.type('First seat y', '1.7')
  await hand.type('In a row', '2')
  await hand.type('Apart', '0.7')
  await hand.type('Group', 'D')
  await hand.press('Set 2 seats')
  await hand.pick('Counts as', 'not heated')
  await hand.type('Body plane', '0.5')
  await hand.type('Head plane', '1')

  console.log(`actions: ${hand.actions}`)
  expect(hand.actions).toBeLessThanOrEqual(mostActions)
  await expect(page.getByText('Saved', { exact: false }).first()).toBeVisible()
  await expect.poll(async () => (await readJob(page.request, /Newcomer/)).site.seats.at(-1)?.headHeight).toBe(1)
  const demo = (await readJob(page.request, /^Sallow Lane/)).site
  compare((await readJob(page.request, /Newcomer/)).site, demo)
})

/** The same place as the demo's, each size within the tolerance that it was listed with, else ± 25 mm (house rule). */
function compare(site: Site, demo: Site): void {
  const sizeOf = (label: string) => demo.dimensions.find((size) => size.label === label)!
  const [length, depth, height, spacing] = [
    'veranda length, x',
    'veranda depth, y',
    'ceiling height',
    'joist spacing',
  ].map((label) => sizeOf(label).tolerance) as [number, number, number, number]
  const within = (value: number, wanted: number, tolerance: number) =>
    expect(Math.abs(value - wanted), `${value} for ${wanted}`).toBeLessThanOrEqual(tolerance + 1e-9)
  expect(site.floor).toHaveLength(demo.floor.length)
  site.floor.forEach(([x, y], i) => {
    within(x, demo.floor[i]![0], length)
    within(y, demo.floor[i]![1], depth)
  })
  const [own, listed] = [coverPlane(site.covers[0]!)!, coverPlane(demo.covers[0]!)!]
  for (const [x, y] of demo.floor) within(planeHeightAt(own, x, y), planeHeightAt(listed, x, y), height)
  within(site.covers[0]!.voidDepth!, sizeOf('ceiling void').value, sizeOf('ceiling void').tolerance)
  expect(site.members).toHaveLength(demo.members.length)
  site.members.forEach(({ from, to, width, depth: deep }, i) => {
    const wanted = demo.members[i]!
    within(from[0], wanted.from[0], Math.max(1, i) * spacing)
    within(to[1], wanted.to[1], depth)
    expect([width, deep]).toEqual([wanted.width, wanted.depth])
  })
  for (const wanted of demo.obstacles) {
    const made = site.obstacles.find(({ kind }) => kind === wanted.kind)!
    expect(made.material, made.kind).toMatch(/unknown|combustible/)
    within2(extent(made), extent(wanted), 0.025)
  }
  expect(site.obstacles).toHaveLength(demo.obstacles.length)
  const placed = (of: Site) =>
    of.seats.map(({ x, y, priority }) => `${x.toFixed(2)} ${y.toFixed(2)} ${priority}`).toSorted()
  expect(placed(site)).toEqual(placed(demo))
}

/** Lowest and highest x, y, z of an obstacle. */
function extent({ shape }: Obstacle): number[] {
  if (shape.kind === 'box') return [...shape.x, ...shape.y, ...shape.z]
  if (shape.kind === 'prism') throw new Error('no prism on this site')
  const { centre, radius, z } = shape
  return [centre[0] - radius, centre[0] + radius, centre[1] - radius, centre[1] + radius, ...z]
}

function within2(values: readonly number[], wanted: readonly number[], tolerance: number): void {
  values.forEach((value, i) =>
    expect(Math.abs(value - wanted[i]!), `${value} for ${wanted[i]}`).toBeLessThanOrEqual(tolerance),
  )
}

test('what cannot be is refused beside its field and nothing typed is lost; a corner moves by hand, by key and by typing', async ({
  page,
}) => {
  await signIn(page, 'designer')
  const before = (await readJob(page.request, /^Sallow Lane/)).site
  await page.goto(`/jobs/${(await readJob(page.request, /^Sallow Lane/)).id}/site`)
  await page.getByRole('tab', { name: /^Floor/ }).click()
  await page.getByText('All corners as text').click()
  const corners = page.getByLabel('Corners, one a line: x, y')
  const many = Array.from({ length: 10_000 }, (_, i) => `${i / 100}, ${i % 7}`).join('\n')
  await corners.evaluate((field, text) => {
    if (!(field instanceof HTMLTextAreaElement)) return
    field.select()
    const clipboardData = new DataTransfer()
    clipboardData.setData('text/plain', text)
    field.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true }))
  }, many)
  await page.getByRole('button', { name: 'Take these corners' }).click()
  await expect(page.getByText('An outline has at most 200 corners; here are 10,000 lines.')).toBeVisible()
  expect(await corners.inputValue()).toBe(many)
  await corners.fill('0, 0\n7.2, 3.1\n7.2, 0\n0, 3.1')
  await page.getByRole('button', { name: 'Take these corners' }).click()
  await expect(page.getByText(/Edges 1 and 3 cross/)).toBeVisible()

  await page.getByRole('tab', { name: /^Covers/ }).click()
  await page.getByRole('button', { name: /^tongue-and-groove/ }).click()
  const height = page.getByLabel('Corner 1 height', { exact: true })
  for (const [typed, words] of [
    ['-1', /above the floor\. Corner 1 is at −1\.00 m/],
    ['300 mm', /Over seat T1 the cover reaches down to 0\.855 m; at least its head at 1\.10 m/],
    ['200 m', /Between −10\.00 m and 100\.00 m/],
  ] as const) {
    await height.fill(typed)
    await height.press('Enter')
    await expect(page.getByText(words).first()).toBeVisible()
    expect(await height.inputValue()).toBe(typed)
    await height.press('Escape')
  }
  expect((await readJob(page.request, /^Sallow Lane/)).site).toEqual(before)

  await page.getByRole('tab', { name: /^Floor/ }).click()
  const corner = async () => (await readJob(page.request, /^Sallow Lane/)).site.floor[2]!
  const plan = page.getByRole('application')
  await page.getByRole('button', { name: 'Corner 3', exact: true }).click()
  await plan.focus()
  await plan.press('Shift+ArrowRight')
  await expect.poll(corner).toEqual([7.3, 3.1])
  const y = page.getByLabel('Corner 3, y', { exact: true })
  await y.fill('3200')
  await y.press('Enter')
  await expect.poll(corner).toEqual([7.3, 3.2])
  const undo = page.getByRole('button', { name: 'Undo' }).first()
  await undo.click()
  await undo.click()
  await expect.poll(corner).toEqual([7.2, 3.1])
  const seat = (await page.locator('[data-seat="D2"] circle').first().boundingBox())!
  await page.mouse.move(seat.x + seat.width / 2, seat.y + seat.height / 2)
  await page.mouse.down()
  for (let step = 1; step <= 5; step++)
    await page.mouse.move(seat.x + seat.width / 2, seat.y + seat.height / 2 - 8 * step)
  await page.mouse.up()
  await expect.poll(async () => (await readJob(page.request, /^Sallow Lane/)).site.seats.at(-1)!.y).toBeGreaterThan(1.8)
  await undo.click()
  await expect.poll(async () => (await readJob(page.request, /^Sallow Lane/)).site).toEqual(before)
})

test('the site of another job is copied whole, and some kinds of things of a third beside it', async ({ page }) => {
  await signIn(page, 'designer')
  await openJob(page, 'Copied veranda')
  const [veranda, umbrellas] = [
    await readJob(page.request, /^Sallow Lane/),
    await readJob(page.request, /^Hotel Quillfinch/),
  ]
  const read = async () => (await readJob(page.request, /^Copied veranda/)).site
  const bare = await read()
  await page.getByRole('button', { name: 'From another job' }).click()
  await page.getByLabel('Job', { exact: true }).selectOption(veranda.id)
  await page.getByRole('button', { name: 'Copy', exact: true }).click()
  await expect(page.getByRole('heading', { name: 'Copy the site of another job' })).toHaveCount(0)
  await expect(page.locator('[data-seat="D2"]')).toBeVisible()
  await expect.poll(async () => (await read()).seats.length).toBe(10)
  // The photo that a size was measured in stays with its own job.
  const dimensions = veranda.site.dimensions.map((size) => ({ ...size, photo: undefined }))
  expect(veranda.site.dimensions.some(({ photo }) => photo)).toBe(true)
  expect(await read()).toEqual({ ...veranda.site, name: bare.name, displayUnits: bare.displayUnits, dimensions })

  await page.getByRole('button', { name: 'From another job' }).click()
  await page.getByLabel('Job', { exact: true }).selectOption(umbrellas.id)
  await page
    .getByRole('button', { name: 'Some kinds' })
    .or(page.getByRole('radio', { name: 'Some kinds' }))
    .click()
  for (const kind of ['covers', 'members']) await page.getByRole('checkbox', { name: kind }).uncheck()
  for (const kind of ['obstacles', 'walls']) await page.getByRole('checkbox', { name: kind }).check()
  await page.getByRole('button', { name: 'Copy', exact: true }).click()
  const more = veranda.site.obstacles.length + umbrellas.site.obstacles.length
  await expect.poll(async () => (await read()).obstacles.length).toBe(more)
  const both = await read()
  expect(both.walls).toHaveLength(veranda.site.walls.length + umbrellas.site.walls.length)
  expect(both.seats).toEqual(veranda.site.seats)
  expect(new Set(both.dimensions.map(({ label }) => label))).toContain('umbrella rim height')
  const undo = page.getByRole('button', { name: 'Undo' }).first()
  await undo.click()
  await undo.click()
  await expect.poll(read).toEqual(bare)
})
