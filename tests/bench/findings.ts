import type { Obstacle } from '#app/domain/site/site.ts'
import { checkLayout } from '#app/domain/rules/check-layout.ts'
import { chance } from '#tests/support/chance.ts'
import { plainBrief, plainHeater, plainModel, plainSite, plainHouse } from '#tests/support/plain-site.ts'

// Time of the findings on a crowded site: 200 obstacles, 40 members and 40 heaters on 40 × 20 m; run with
// `node --import tsx tests/bench/findings.ts`. The fixed loop of the same run says how fast the machine is just then.

const random = chance(3)

function obstacle(_: unknown, i: number): Obstacle {
  const [x, y, z] = [random() * 40, random() * 20, random() * 2.6]
  const [across, along] = [0.1 + random(), 0.1 + random()]
  const height: [number, number] = [z, z + 0.5]
  const shape: Obstacle['shape'] =
    i % 3 === 0
      ? { kind: 'cylinder', centre: [x, y], radius: across / 2, z: height }
      : { kind: 'box', x: [x, x + across], y: [y, y + along], z: height }
  const facts = { material: 'combustible' as const, movable: i % 4 === 0, transmittance: 0, note: null }
  return { id: `o${i}`, name: `thing ${i}`, kind: 'other', shape, ...facts }
}

const { covers, members } = plainSite()
const [roof, beam] = [covers[0]!, members[0]!]
const site = plainSite({
  obstacles: Array.from({ length: 200 }, obstacle),
  members: Array.from({ length: 40 }, (_, i) => ({ ...beam, id: `m${i}`, name: `m${i}`, from: [i, 0], to: [i, 20] })),
  covers: [{ ...roof, corners: [[0, 0, 3], [40, 0, 3], [40, 20, 3], [0, 20, 3]] }], // prettier-ignore
})
const model = plainModel()
const heaters = Array.from({ length: 40 }, (_, i) =>
  plainHeater({ id: `H${i}`, x: i, y: 2 + ((i * 7) % 16), memberId: `m${i}`, turnDeg: 90 }),
)
const brief = plainBrief()
const house = plainHouse()

function findings(moved: number, by: number): number {
  const layout = { heaters: heaters.map((heater, i) => (i < moved ? { ...heater, x: heater.x + by } : heater)) }
  return checkLayout({ site, brief, layout, models: new Map([[model.code, model]]), warmth: [], house }).length
}

function loop(): number {
  let s = 0
  for (let i = 0; i < 1_152_000; i++) {
    const q = 1 + (i & 1023) * 1e-3
    s += 1 / (q * Math.sqrt(q))
  }
  return s
}

function median(work: (round: number) => number): number {
  const times = Array.from({ length: 15 }, (_, round) => {
    const start = performance.now()
    work(round)
    return performance.now() - start
  })
  return times.toSorted((a, b) => a - b)[7]!
}

for (let warm = 0; warm < 5; warm++) findings(40, warm * 1e-4)
const base = median(loop)
for (const [name, moved] of [
  ['one heater moved', 1],
  ['all 40 heaters moved', 40],
] as const) {
  const time = median((round) => findings(moved, (round + 1) * 1e-3))
  console.log(`${name}: ${time.toFixed(1)} ms, ${(time / base).toFixed(2)} × the loop (${base.toFixed(1)} ms)`)
}
