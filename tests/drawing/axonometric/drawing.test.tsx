import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import { AxonometricDrawing } from '#app/drawing/axonometric/axonometric-drawing.tsx'
import { piecesOf } from '#app/drawing/axonometric/pieces.ts'
import { corners, projectionFrom } from '#app/drawing/axonometric/projection.ts'
import { irradianceScale } from '#app/drawing/heat/quantity.ts'
import { screenPen } from '#app/drawing/pen.ts'
import { smallHeater, smallLayout, smallModel, smallModels, smallTerrace } from '#tests/drawing/small-terrace.ts'

const drawn = (corner: (typeof corners)[number], theme: 'dusk' | 'day' = 'dusk', site = smallTerrace) =>
  renderToStaticMarkup(
    <AxonometricDrawing
      name="a"
      label="A picture"
      site={site}
      layout={smallLayout()}
      models={smallModels}
      rules={plainHouseRules}
      picture={null}
      quantity={irradianceScale(theme, { low: 150, high: 350 })}
      pen={screenPen(theme)}
      width={800}
      height={500}
      {...{ corner }}
    />,
  )
const pieces = (corner: (typeof corners)[number] = 'lower left') =>
  piecesOf(smallTerrace, smallLayout(), smallModels, plainHouseRules, projectionFrom(corner).toEye)

describe('the pieces of a picture', () => {
  it('are everything that stands on the site, hangs over it or sits there', () => {
    const keys = pieces('upper left').pieces.map(({ key }) => key)
    expect(keys).toEqual(expect.arrayContaining(['wall wall', 'member beam-1', 'obstacle trim 0', 'table T1', 'seat T1-1', 'seat T1-2', 'heater H1'])) // prettier-ignore
  })
  it('have a wall in the order only where it is behind, else as an outline in front', () => {
    // The wall runs along y = 0 and the floor lies above it on the plan.
    for (const corner of corners) {
      const { pieces: all, front } = pieces(corner)
      const behind = corner.startsWith('upper')
      expect(all.some(({ look }) => look === 'wall')).toBe(behind)
      expect(front).toHaveLength(behind ? 0 : 1)
    }
  })
  it('have the member under the cover at its own slope', () => {
    const member = pieces().pieces.find(({ key }) => key === 'member beam-1')!
    for (const [, y, z] of member.solid.corners) {
      const underside = 3 - (0.4 / 3) * y
      expect(Math.min(Math.abs(z - underside), Math.abs(z - underside - 0.12))).toBeCloseTo(0, 9)
    }
  })
  it('have the heater’s body with its eight corners at the sizes of its model, its lowest at its height', () => {
    const { solid } = pieces().pieces.find(({ key }) => key === 'heater H1')!
    const { length, width, depth } = smallModel.body
    const far = Math.max(...solid.corners.flatMap((a) => solid.corners.map((b) => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2])))) // prettier-ignore
    expect(far).toBeCloseTo(Math.hypot(length, width, depth), 9)
    expect(Math.min(...solid.corners.map(([, , z]) => z))).toBeCloseTo(smallHeater().lowestPoint, 9)
  })
  it('hang the heater from what the schedule says: plumb under the underside', () => {
    const hangers = pieces().pieces.filter(({ look }) => look === 'hanger')
    expect(hangers).toHaveLength(2)
    for (const { solid } of hangers) {
      const [from, to] = solid.corners
      expect(to![2]).toBeCloseTo(3 - (0.4 / 3) * to![1], 6)
      expect(Math.hypot(from![0] - to![0], from![1] - to![1])).toBeLessThan(0.02)
    }
  })
})

describe('the picture as it is drawn', () => {
  it.each(corners)('from the %s shows guests, heater, hangers and the cover', (corner) => {
    const markup = drawn(corner)
    for (const mark of [
      'data-seat="T1-1"',
      'data-seat="T1-2"',
      'data-heater="H1"',
      'data-hanger="H1"',
      'data-cover="cover"',
      'data-table="T1"',
      '>H1<',
    ])
      // prettier-ignore
      expect(markup).toContain(mark)
    expect(markup).not.toContain('NaN')
  })
  it('paints the guest behind the table before it, from either side', () => {
    const at = (markup: string, mark: string) => markup.indexOf(mark)
    // T1-1 sits at the lower x, T1-2 at the higher one: seen from the left the second is behind the table.
    const left = drawn('lower left')
    expect(at(left, 'data-seat="T1-2"')).toBeLessThan(at(left, 'data-table="T1"'))
    expect(at(left, 'data-table="T1"')).toBeLessThan(at(left, 'data-seat="T1-1"'))
    const right = drawn('upper right')
    expect(at(right, 'data-seat="T1-1"')).toBeLessThan(at(right, 'data-table="T1"'))
    expect(at(right, 'data-table="T1"')).toBeLessThan(at(right, 'data-seat="T1-2"'))
  })
  it('is drawn in the colours of dusk or of daylight', () => {
    expect(drawn('lower left')).toContain('#0c1322')
    expect(drawn('lower left', 'day')).not.toContain('#0c1322')
  })
  it('says that guests are left out where there are too many things, and only there', () => {
    const [seat] = smallTerrace.seats
    const seats = Array.from({ length: 901 }, (_, i) => ({ ...seat!, id: `many ${i}` }))
    const words = 'the guests are not drawn'
    expect(drawn('lower left', 'dusk', { ...smallTerrace, seats })).toContain(words)
    expect(drawn('lower left')).not.toContain(words)
  })
})
