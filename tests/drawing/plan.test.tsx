import { describe, expect, it } from 'vitest'
import type { ReactElement } from 'react'
import { renderToStaticMarkup } from 'react-dom/server'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'
import { gridOf } from '#app/domain/flux/grid.ts'
import { contoursOf } from '#app/drawing/heat/contours.ts'
import { irradianceScale } from '#app/drawing/heat/quantity.ts'
import { printPen, screenPen } from '#app/drawing/pen.ts'
import { rowOf } from '#app/drawing/plan/dimensions.tsx'
import { HeaterMark } from '#app/drawing/plan/heater.tsx'
import { placeLineLabels } from '#app/drawing/plan/line-labels.tsx'
import { meets, patch } from '#app/drawing/plan/occupied.ts'
import { PlanDrawing } from '#app/drawing/plan/plan-drawing.tsx'
import { planViewOf, toScreen, toSite } from '#app/drawing/plan/plan-view.ts'
import { PlanThumbnail } from '#app/drawing/plan/plan-thumbnail.tsx'
import { backArc, SeatMark, type SeatSign } from '#app/drawing/plan/seat.tsx'
import { wallCorners } from '#app/drawing/plan/wall.tsx'
import { smallHeater, smallLayout, smallModel, smallModels, smallTerrace } from '#tests/drawing/small-terrace.ts'

const target = { low: 150, high: 350 }
const dusk = screenPen('dusk')
const markup = (drawing: ReactElement): string => renderToStaticMarkup(drawing).replaceAll('><', '>\n<')
const signs = (outcome: 'below' | 'in target' | 'above'): ReadonlyMap<string, SeatSign> =>
  new Map(smallTerrace.seats.map(({ id }) => [id, { kind: 'figure', text: '228', outcome }]))

const bare = { names: false, spacings: true, overall: false, scaleBar: false, lineFigures: true } as const
const smallPlan = (theme: 'dusk' | 'day', tiltDeg = 0) => (
  <PlanDrawing
    name="p"
    label="Plan"
    site={smallTerrace}
    layout={smallLayout(tiltDeg ? { tiltDeg, mount: 'drop rods', x: 1.8 } : {})}
    models={smallModels}
    view={planViewOf(smallTerrace, 320)}
    pen={screenPen(theme)}
    quantity={irradianceScale(theme, target)}
    picture={null}
    signs={signs('in target')}
    detail={bare}
  />
)

describe('the view', () => {
  it('turns the site over: y up on the site, down on the drawing', () => {
    const view = planViewOf(smallTerrace, 400)
    expect(toScreen(view, [0, 3])[1]).toBeLessThan(toScreen(view, [0, 0])[1])
    const back = toSite(view, toScreen(view, [1.25, 2.5]))
    expect(back[0]).toBeCloseTo(1.25, 9)
    expect(back[1]).toBeCloseTo(2.5, 9)
  })
  it('shows the whole floor in a fixed room', () => {
    const view = planViewOf(smallTerrace, 900, 300)
    for (const corner of smallTerrace.floor) {
      const [x, y] = toScreen(view, corner)
      expect(x).toBeGreaterThanOrEqual(0)
      expect(x).toBeLessThanOrEqual(900)
      expect(y).toBeGreaterThanOrEqual(0)
      expect(y).toBeLessThanOrEqual(300)
    }
  })
})

describe('marks', () => {
  it('has the back of a chair on the side away from where the person looks', () => {
    const points = (facing: number) =>
      backArc(0, 0, 10, facing)
        .match(/-?[\d.]+/g)!
        .map(Number)
    const [x1, , , , , , , x2] = points(0)
    expect(Math.max(x1!, x2!)).toBeLessThan(0)
    const [, y1, , , , , , , y2] = points(90)
    expect(Math.min(y1!, y2!)).toBeGreaterThan(0)
  })
  it('draws the outcome of a seat as a ring: dashed, plain, double', () => {
    const view = planViewOf(smallTerrace, 400)
    const ring = (outcome: 'below' | 'in target' | 'above') =>
      markup(
        <SeatMark
          seat={smallTerrace.seats[0]!}
          sign={{ kind: 'figure', text: '1', outcome }}
          view={view}
          pen={dusk}
          withFigure
        />,
      )
    const counts = (['below', 'in target', 'above'] as const).map((outcome) => [
      ring(outcome).match(/<circle/g)!.length,
      ring(outcome).includes('stroke-dasharray'),
    ])
    expect(counts).toEqual([
      [1, true],
      [1, false],
      [2, false],
    ])
  })
  it.each([
    [90, -22, 1],
    [90, 22, -1],
    [-90, 22, 1],
  ])('points the chevron where the beam goes (turn %d, tilt %d)', (turnDeg, tiltDeg, side) => {
    const drawn = markup(
      <HeaterMark
        heater={smallHeater({ turnDeg, tiltDeg })}
        model={smallModel}
        site={smallTerrace}
        view={planViewOf(smallTerrace, 400)}
        pen={dusk}
      />,
    )
    const chevron = [...drawn.matchAll(/<path d="M([-\d.]+) ([-\d.]+)L([-\d.]+) ([-\d.]+)L/g)].at(-1)!
    expect(Math.sign(Number(chevron[3]) - Number(chevron[1]))).toBe(side)
  })
  it('has no chevron straight down, round eyes on chains and square heads on rods', () => {
    const draw = (facts: object) =>
      markup(
        <HeaterMark
          heater={smallHeater(facts)}
          model={smallModel}
          site={smallTerrace}
          view={planViewOf(smallTerrace, 400)}
          pen={dusk}
        />,
      )
    expect(draw({})).not.toContain('<path')
    expect(draw({}).match(/<circle/g)).toHaveLength(2)
    expect(draw({ mount: 'drop rods' })).not.toContain('<circle')
  })
  it('puts a wall on the side away from the floor', () => {
    const view = planViewOf(smallTerrace, 400)
    const floor = toScreen(view, [0, 0])[1]
    expect(Math.max(...wallCorners(smallTerrace.walls[0]!, view).map(([, y]) => y))).toBeGreaterThan(floor + 5)
  })
  it('carries the ids that a gesture needs', () => {
    const drawn = markup(smallPlan('dusk'))
    for (const id of ['data-heater="H1"', 'data-seat="T1-1"', 'data-member="beam-1"', 'data-table="T1"'])
      expect(drawn).toContain(id)
  })
})

describe('a row of heaters', () => {
  const at = (id: string, x: number, y: number) => smallHeater({ id, x, y })
  const heaters = [at('H1', 1, 1), at('H2', 3, 1), at('H3', 0.5, 2), at('H4', 2, 2), at('H5', 3.5, 2)]
  it('is the fullest, or that of the selected heater', () => {
    expect(rowOf(heaters, 0, new Set())).toEqual([0.5, 2, 3.5])
    expect(rowOf(heaters, 0, new Set(['H2']))).toEqual([1, 3])
  })
  it('is empty without heaters', () => expect(rowOf([], 0, new Set())).toEqual([]))
})

describe('patches', () => {
  it.each([
    [patch(0, 0, 10, 10), patch(12, 0, 10, 10), 0, false],
    [patch(0, 0, 10, 10), patch(12, 0, 10, 10), 3, true],
    [patch(0, 0, 40, 4, 45), patch(14, -14, 6, 6), 0, false],
    [patch(0, 0, 40, 4, 45), patch(12, 12, 6, 6), 0, true],
  ])('meet or not (%#)', (a, b, gap, met) => expect(meets(a, b, gap)).toBe(met))
})

describe('isoline figures', () => {
  it('stay 9 px clear of what is given and on the floor, three a level at most', () => {
    const grid = gridOf(smallTerrace.floor, 0.6, 0.05)
    const values = Float32Array.from({ length: grid.columns * grid.rows }, (_, k) => {
      const x = grid.x0 + ((k % grid.columns) + 0.5) * grid.cell - 2
      const y = grid.y0 + (Math.floor(k / grid.columns) + 0.5) * grid.cell - 1.5
      return 480 - 150 * Math.hypot(x, y)
    })
    const quantity = irradianceScale('dusk', target)
    const picture = contoursOf(values, grid, quantity.levels)
    const view = planViewOf(smallTerrace, 900)
    const seats = smallTerrace.seats.map((seat) => patch(...toScreen(view, [seat.x, seat.y]), 60, 60))
    const labels = placeLineLabels(picture, quantity, smallTerrace.floor, view, dusk, seats)
    expect(labels.length).toBeGreaterThan(3)
    const levels = labels.map(({ level }) => level)
    for (const level of new Set(levels)) {
      expect([100, 150, 200, 300, 350, 400]).toContain(level)
      expect(levels.filter((one) => one === level).length).toBeLessThanOrEqual(3)
    }
    for (const [i, label] of labels.entries()) {
      const box = patch(label.x, label.y, 18, 8, label.turnDeg)
      for (const seat of seats) expect(meets(box, seat, 8.5)).toBe(false)
      for (const other of labels.slice(i + 1))
        expect(meets(box, patch(other.x, other.y, 18, 8, other.turnDeg), 8.5)).toBe(false)
      const [x, y] = toSite(view, [label.x, label.y])
      expect(x > 0 && x < 4 && y > 0 && y < 3).toBe(true)
    }
  })
})

describe('words on a plan', () => {
  const models = new Map(demoModels().map((model) => [model.code, model]))
  it.each(demoSites().flatMap((demo) => [280, 390, 700, 1000, 1600].map((width) => [demo.key, width, demo] as const)))(
    'are at least 11 px on screen at every scale (site %s, %d px)',
    (_, width, demo) => {
      const signs = new Map(
        demo.site.seats.map(({ id }): [string, SeatSign] => [id, { kind: 'figure', text: '228', outcome: 'below' }]),
      )
      const drawn = markup(
        <PlanDrawing
          name="p"
          label="Plan"
          site={demo.site}
          layout={demo.variants[1]!.layout}
          models={models}
          view={planViewOf(demo.site, width)}
          pen={dusk}
          quantity={irradianceScale('dusk', target)}
          picture={null}
          signs={signs}
        />,
      )
      const sizes = [...drawn.matchAll(/font-size="([\d.]+)"/g)].map((found) => Number(found[1]))
      expect(sizes.length).toBeGreaterThan(0)
      expect(Math.min(...sizes)).toBeGreaterThanOrEqual(11)
      const discs = [...drawn.matchAll(/data-seat[^]*?<circle[^>]* r="([\d.]+)"/g)].map((found) => Number(found[1]))
      if (drawn.includes('>228<')) expect(Math.min(...discs)).toBeGreaterThanOrEqual(11.5)
    },
  )
  it('are about 2 mm on paper', () => {
    for (const size of [printPen.text, printPen.seatText, printPen.lineText]) {
      expect(size).toBeGreaterThanOrEqual(7)
      expect(size).toBeLessThanOrEqual(9)
    }
  })
  it('are not in a thumbnail', () => {
    const small = (
      <PlanThumbnail
        name="t"
        label="Small plan"
        site={smallTerrace}
        layout={smallLayout()}
        models={smallModels}
        picture={null}
        quantity={irradianceScale('dusk', target)}
        width={160}
      />
    )
    expect(markup(small)).not.toContain('<text')
  })
})

describe('stored drawings', () => {
  it.each([
    ['plan-dusk', smallPlan('dusk')],
    ['plan-day-tilted', smallPlan('day', 22)],
  ])('%s is as it was', async (name, drawing) => {
    await expect(`${markup(drawing)}\n`).toMatchFileSnapshot(`golden/${name}.svg`)
  })
})
