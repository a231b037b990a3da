import { PNG } from 'pngjs'
import { beforeAll, describe, expect, it } from 'vitest'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'
import { layoutTotals, seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { emitterOf, type Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { answerMap, emptyMapCache } from '#app/drawing/heat/map-picture.ts'
import { irradianceOfColour } from '#app/drawing/heat/scale.ts'
import { toScreen } from '#app/drawing/plan/plan-view.ts'
import { ComparisonSheet } from '#app/drawing/sheet/comparison-sheet.tsx'
import { fitCautions } from '#app/drawing/sheet/sheet-cautions.tsx'
import { sheetScale, type ComparisonSheetProps, type SheetVariant } from '#app/drawing/sheet/sheet-facts.ts'
import { perMillimetre, sheetLayoutOf, sheetSize } from '#app/drawing/sheet/sheet-layout.ts'
import { moneyText, sheetFigures } from '#app/drawing/sheet/sheet-words.ts'
import { pngOf, svgDocument, svgOf } from '#app/server/render/picture.server.ts'

const demo = demoSites()[0]!
const models = new Map(demoModels().map((model) => [model.code, model]))
const emittersOf = (i: number): Emitter[] =>
  demo.variants[i]!.layout.heaters.flatMap((heater) => emitterOf(heater, models.get(heater.model)!) ?? [])

function variantAt(i: number): SheetVariant {
  const { number, title, layout } = demo.variants[i]!
  const { levels, edges } = sheetScale(demo.brief)
  const question = {
    emitters: emittersOf(i),
    floor: demo.site.floor,
    z: 0.6,
    cell: 0.05,
    quantity: { kind: 'flux' as const },
  }
  const { picture } = answerMap({ ...question, levels, edges }, emptyMapCache())
  const warmth = seatWarmth({ site: demo.site, brief: demo.brief, layout, models })
  const totals = layoutTotals(warmth, layout, models, demo.brief)
  return { number, title, revision: 4, layout, picture, warmth, totals }
}

const props: ComparisonSheetProps = {
  site: demo.site,
  brief: demo.brief,
  models,
  variants: [variantAt(1), variantAt(2)],
  planeHeight: 0.6,
  organisation: 'Osierfold Terrace Heating',
  date: '1 Dec 2026',
  cautions: ['Heaters warm people, not the air.', 'Load on the roof beams: to be confirmed by the maker of the roof.'],
}
const sheet = svgOf(<ComparisonSheet {...props} />)
const layout = sheetLayoutOf(demo.site, 2)

describe('the sheet', () => {
  it('is A4 with the plans at true 1 : 100 where they fit, at a stated scale where not', () => {
    expect(sheetSize.width / perMillimetre).toBeCloseTo(297, 6)
    expect(layout.denominator).toBe(100)
    expect(layout.variants[0]!.view.scale).toBeCloseTo(10 * perMillimetre, 9)
    const wide = sheetLayoutOf(demoSites()[1]!.site, 4)
    expect(wide.denominator).toBeGreaterThan(100)
    for (const { plan } of wide.variants) expect(plan.x + plan.width).toBeLessThanOrEqual(sheetSize.width)
    expect(sheet).toContain('1 : 100 on A4')
  })
  it.each([2, 3, 4])('keeps everything apart and on the page (%d variants)', (count) => {
    for (const { site } of demoSites()) {
      const { variants, plot, cautions, key, strip } = sheetLayoutOf(site, count)
      const lowest = Math.max(
        ...variants.map(({ plan, figures }) => Math.max(plan.y + plan.height, figures.y + figures.height)),
      )
      expect(lowest).toBeLessThanOrEqual(plot.y + 12)
      expect(plot.height).toBeGreaterThan(110)
      expect(plot.y + plot.height).toBeLessThanOrEqual(strip.y)
      expect(cautions.x + cautions.width).toBeLessThan(key.x)
      expect(strip.y + strip.height).toBeLessThan(sheetSize.height)
    }
  })
  it('says what it must and nothing that it must not', () => {
    for (const words of [
      'Calculated, not a',
      'thermal photograph',
      'Not yet checked',
      '1 Dec 2026',
      '2.4 and 3.4',
      'Osierfold Terrace Heating',
      'in target',
      'slightly cool',
    ])
      expect(sheet).toContain(words)
    for (const secret of ['Price', 'margin', '@', 'cost price', demo.variants[1]!.layout.heaters[0]!.model])
      expect(sheet).not.toContain(secret)
  })
  it('says a price and a check only where they are given', () => {
    const variants = props.variants.map((one) => ({
      ...one,
      priceWithTax: { amount: 6065.04, currency: 'EUR' as const },
    }))
    const priced = svgOf(<ComparisonSheet {...props} variants={variants} checked="Variant 3, with a condition" />)
    expect(priced).toContain('€ 6 065.04')
    expect(priced).not.toContain('Not yet checked')
    expect(moneyText(1234567.5, 'USD')).toBe('$ 1 234 567.50')
  })
  it('has words of 7 px and more', () => {
    const sizes = [...sheet.matchAll(/font-size="([\d.]+)"/g)].map((found) => Number(found[1]))
    expect(Math.min(...sizes)).toBeGreaterThanOrEqual(7)
  })
  it('counts the cautions that have no room', () => {
    const many = Array.from(
      { length: 30 },
      (_, i) => `Caution number ${i}, which is long enough to take two lines of this box.`,
    )
    const { lines, left } = fitCautions(many, 250, 200)
    expect(lines.length + left).toBe(30)
    expect(left).toBeGreaterThan(0)
    expect(lines.length).toBeGreaterThan(3)
  })
  it('writes the cautions smaller rather than leave one out', () => {
    const few = Array.from(
      { length: 8 },
      (_, i) => `Caution number ${i}, which is long enough to take two lines of this box.`,
    )
    const roomy = fitCautions(few, 250, 400)
    const narrow = fitCautions(few, 250, 200)
    expect([roomy.left, narrow.left]).toEqual([0, 0])
    expect(narrow.size).toBeLessThan(roomy.size)
    const height = narrow.lines.reduce((sum, one) => sum + one.length * narrow.size * 1.2, 0)
    expect(height).toBeLessThanOrEqual(200)
  })
})

describe('the picture of the sheet', () => {
  const scale = 2
  let image: PNG
  beforeAll(async () => {
    image = PNG.sync.read(await pngOf(sheet, scale))
  })
  const pixel = (x: number, y: number): [number, number, number] => {
    const at = (Math.round(y) * image.width + Math.round(x)) * 4
    return [image.data[at]!, image.data[at + 1]!, image.data[at + 2]!]
  }
  /** Middle of the readable pixels about a point of the site, W/m². */
  function readAt(i: number, x: number, y: number): number | null {
    const { plan, view } = layout.variants[i]!
    const [px, py] = toScreen(view, [x, y])
    const near = [-3, -2, -1, 0, 1, 2, 3]
    const found = near
      .flatMap((dx) => near.map((dy) => pixel((plan.x + px) * scale + dx, (plan.y + py) * scale + dy)))
      .flatMap((rgb) => irradianceOfColour(rgb, 'day', 1.5) ?? [])
      .sort((a, b) => a - b)
    return found.length > 12 ? found[Math.floor(found.length / 2)]! : null
  }
  const isFree = (i: number, x: number, y: number): boolean => {
    const heaters = demo.variants[i + 1]!.layout.heaters
    return (
      demo.site.seats.every((seat) => Math.hypot(seat.x - x, seat.y - y) > 0.35) &&
      heaters.every((heater) => Math.abs(heater.x - x) > 0.3 || Math.abs(heater.y - y) > 0.8) &&
      demo.site.members.every((member) => Math.abs(member.from[0] - x) > 0.15)
    )
  }
  it('is the sheet at twice its size, with its words in it', () => {
    expect(Math.abs(image.width - sheetSize.width * scale)).toBeLessThan(1)
    expect(Math.abs(image.height - sheetSize.height * scale)).toBeLessThan(1)
    const { x, y } = layout.header
    const dark = Array.from({ length: 400 }, (_, i) => pixel(x * scale + i, (y + 13) * scale)).filter(([r]) => r < 80)
    expect(dark.length).toBeGreaterThan(40)
  })
  it.each([0, 1])('can be read back to W/m² at free places of the floor (plan %d)', (i) => {
    const emitters = emittersOf(i + 1)
    const compared: number[] = []
    for (let x = 0.35; x < 13; x += 0.47) {
      for (let y = 0.35; y < 5.2; y += 0.41) {
        if (!isFree(i, x, y)) continue
        const read = readAt(i, x, y)
        if (read === null) continue
        const truth = emitters.reduce((sum, emitter) => sum + irradianceAt(emitter, [x, y, 0.6], [0, 0, 1]), 0)
        compared.push(Math.abs(read - truth))
        expect(Math.abs(read - truth), `${x.toFixed(2)}, ${y.toFixed(2)}: ${truth.toFixed(0)}`).toBeLessThan(9)
      }
    }
    expect(compared.length).toBeGreaterThan(60)
  })
  it('has no heat outside the floor', () => {
    const { plan, view } = layout.variants[0]!
    const at = (x: number, y: number) => {
      const [px, py] = toScreen(view, [x, y])
      return pixel((plan.x + px) * scale, (plan.y + py) * scale)
    }
    for (let x = 0.5; x < 13; x += 0.37) expect(Math.min(...at(x, 5.47))).toBeGreaterThan(140)
    expect(at(-0.08, 2)).toEqual([255, 255, 255])
  })
})

describe('the sheet as a document', () => {
  it('stands alone: it carries two weights of its words', async () => {
    const document = await svgDocument(<ComparisonSheet {...props} />)
    expect(document.match(/@font-face/g)).toHaveLength(2)
    expect(document).toContain('data:font/woff2;base64,')
    expect(document).not.toMatch(/href="http|url\(http/)
    expect(document.startsWith('<?xml')).toBe(true)
  })
})

describe('the irradiance below a plan', () => {
  const { warmth, totals } = variantAt(2)
  const named = (of: SheetVariant['warmth']) =>
    sheetFigures(of, totals, demo.brief, 'metric', null).map(({ name }) => name)

  it('says so when it is of the primary seats alone', () => {
    expect(named(warmth)).toContain('Seats')
    const [first, ...rest] = warmth
    const mixed = [{ ...first!, seat: { ...first!.seat, priority: 'secondary' as const } }, ...rest]
    expect(named(mixed)).toContain('Primary seats')
    expect(named(mixed)).not.toContain('Seats')
  })
})
