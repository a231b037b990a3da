import { expect, it } from 'vitest'
import { obstructionsOf } from '#app/domain/flux/shading.ts'
import { solidOf } from '#app/domain/site/solids.ts'
import type { Table } from '#app/domain/site/site.ts'
import { plainSite } from '#tests/support/plain-site.ts'

const table: Table = {
  id: 'T1',
  form: 'round',
  centre: [3, 2],
  size: [1, 1],
  turnDeg: 0,
  height: 0.74,
  material: 'combustible',
}
const site = plainSite({ tables: [table] })

it('a round table reaches as far in every direction, to its radius and its top', () => {
  const [part] = solidOf(site, { of: 'table', id: 'T1', stateIndex: null })!.parts
  for (const angle of [0, 0.3, Math.PI / 4, 2]) {
    const [x, y, z] = part!.farthest([Math.cos(angle), Math.sin(angle), 0.1])
    expect(Math.hypot(x - 3, y - 2)).toBeCloseTo(0.5, 9)
    expect(z).toBe(0.74)
  }
})

it('a round table shades as a disc and a rectangular one as its rectangle', () => {
  const kinds = (form: Table['form']) =>
    obstructionsOf(plainSite({ tables: [{ ...table, form }] }), { title: '', heaters: [] }, new Map())
      .filter(({ id }) => id === 'T1')
      .flatMap(({ solids }) => solids.map(({ kind }) => kind))
  expect(kinds('round')).toEqual(['cylinder'])
  expect(kinds('rectangular')).toEqual(['convex'])
})
