import { expect, type Locator, type Page } from '@playwright/test'

/** A place on the screen, px. */
export type Place = readonly [x: number, y: number]

/** The middle of something shown. */
export const middleOf = async (what: Locator): Promise<Place> => {
  const box = (await what.boundingBox())!
  return [box.x + box.width / 2, box.y + box.height / 2]
}
export const apart = (a: Place, b: Place): number => Math.hypot(a[0] - b[0], a[1] - b[1])

/**
 * Fingers on the screen, as the browser's own touch events: each goes straight from one place to another. The page itself
 * neither scrolls nor grows under them.
 */
export async function fingers(page: Page, ...ways: readonly (readonly [from: Place, to: Place])[]): Promise<void> {
  const steps = 8
  const scrolled = () => page.evaluate(() => [window.scrollX, window.scrollY, window.visualViewport?.scale])
  const still = await scrolled()
  const cdp = await page.context().newCDPSession(page)
  for (let step = 0; step <= steps; step++) {
    const touchPoints = ways.map(([[ax, ay], [bx, by]], id) => {
      return { id, x: ax + ((bx - ax) * step) / steps, y: ay + ((by - ay) * step) / steps }
    })
    await cdp.send('Input.dispatchTouchEvent', { type: step === 0 ? 'touchStart' : 'touchMove', touchPoints })
  }
  await cdp.send('Input.dispatchTouchEvent', { type: 'touchEnd', touchPoints: [] })
  await cdp.detach()
  expect(await scrolled()).toEqual(still)
}
