import { describe, expect, it } from 'vitest'
import { fluxTolerances } from '#app/domain/comfort/uncertainty.ts'
import { explainSeat } from '#app/domain/comfort/explain.ts'
import { seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { assumedBrief } from '#app/domain/brief/enquiry.ts'
import { weigh } from '#app/domain/doubt/weighed.ts'
import { unmoved, unstatedDoubts } from '#app/domain/doubt/doubtful-size.ts'
import { startingSite } from '#app/domain/job/job-request.ts'
import { hangerTolerance } from '#app/domain/layout/hanger-tolerance.ts'
import { hangScheduleOf } from '#app/domain/layout/hanging.ts'
import { supportOf } from '#app/domain/layout/supports.ts'
import { photoTolerance } from '#app/domain/photo/photo-tolerance.ts'
import { checkLayout } from '#app/domain/rules/check-layout.ts'
import { houseFigure, plainHouseRules } from '#app/domain/rules/house-rules.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { placedByHand } from '#app/domain/site/placed-by-hand.ts'
import { usualTolerance } from '#app/domain/site/size-source.ts'
import { siteTemplates } from '#app/domain/site/templates/site-templates.ts'
import { plainBrief, plainHeater, plainHouse, plainModel, plainSite } from '#tests/support/plain-site.ts'

const model = plainModel()
const models = new Map([[model.code, model]])
const layout = { title: 'One', heaters: [plainHeater()] }
const own = 'house rule, set by this organisation'

/** The findings of a rule in a house with these rules; its one seat gets `head` at the head. */
function found(rule: string, rules: Partial<HouseRules>, change: Partial<Parameters<typeof checkLayout>[0]> = {}) {
  const rests = { site: plainSite(), brief: plainBrief(), layout, models, ...change }
  const warmth = seatWarmth(rests).map((seat) => ({ ...seat, head: 500 }))
  return checkLayout({ ...rests, warmth, house: plainHouse(rules) }).filter((finding) => finding.rule === rule)
}

it('are by default those that the product states', () => {
  // Laser 5 mm, tape 10, drawing 25, photo the greater of 3 % and 50 mm, guess 10 %, a size without any ± 25 mm;
  // open sky: second numeral 5, closed cover 4; supply over 1.1 × rated fails.
  const { toleranceLaser, toleranceTape, toleranceDrawing, tolerancePhotoShare, tolerancePhotoLeast } = plainHouseRules
  expect([toleranceLaser, toleranceTape, toleranceDrawing, tolerancePhotoShare, tolerancePhotoLeast]).toEqual([0.005, 0.01, 0.025, 0.03, 0.05]) // prettier-ignore
  const { toleranceGuessShare, toleranceUnstated, ingressOpenSky, ingressUnderCover, supplyOverRated } = plainHouseRules
  expect([toleranceGuessShare, toleranceUnstated, ingressOpenSky, ingressUnderCover, supplyOverRated]).toEqual([0.1, 0.025, 5, 4, 1.1]) // prettier-ignore
})

it('say whose they are: the default’s source until the organisation decides otherwise', () => {
  expect(houseFigure(plainHouseRules, 'headCautionLongStay').source).toBe('house caution; no published limit was found')
  expect(houseFigure({ ...plainHouseRules, headCautionLongStay: 500 }, 'headCautionLongStay')).toEqual({ value: 500, source: own }) // prettier-ignore
})

describe('a house’s own rule goes into the finding that it is about, with its source', () => {
  const caution = (rules: Partial<HouseRules>, stayMinutes = 90) =>
    found('head-flux', rules, { brief: plainBrief({ stayMinutes }) }).find(({ weight }) => weight === 'soft')
  it('the head caution of either stay, and what a long stay is', () => {
    expect(caution({ headCautionLongStay: 510 })?.outcome).not.toBe('fails')
    expect(caution({ headCautionLongStay: 490 })).toMatchObject({ outcome: 'fails', limit: 490, source: own })
    expect(caution({ headCautionLongStay: 490 }, 20)?.limit).not.toBe(490)
    expect(caution({ headCautionLongStay: 490, longStayMinutes: 20 }, 20)?.limit).toBe(490)
    expect(caution({ headCautionShortStay: 490, headCautionLongStay: 480 }, 20)?.limit).toBe(490)
  })

  it('the stop line stays where it is', () => {
    const stop = found('head-flux', { headCautionLongStay: 100, headCautionShortStay: 100 }).find(({ weight }) => weight === 'hard stop') // prettier-ignore
    expect([stop?.outcome, stop?.limit, stop?.source.startsWith('API Standard 521')]).toEqual(['pass', 1580, true])
  })

  it('the voltage above the rated one', () => {
    const above = { layout: { heaters: [plainHeater({ supplyVoltage: 245, ratedVoltage: 230 })] } }
    expect(found('voltage-offered', {}, above)[0]?.outcome).toBe('pass')
    // 1.05 · 230 V = 241.5 V.
    const [over] = found('voltage-offered', { supplyOverRated: 1.05 }, above)
    expect([over?.outcome, over?.source]).toEqual(['fails', own])
    expect(over?.limit).toBeCloseTo(241.5, 9)
  })

  it('the numerals of the ingress protection', () => {
    const tight = plainModel({ ingressProtection: 'IP44', locationNote: 'may stand in the rain' })
    const on = { models: new Map([[tight.code, tight]]) }
    expect(found('ingress-protection', {}, on)[0]?.outcome).toBe('pass')
    expect(found('ingress-protection', { ingressUnderCover: 5 }, on)[0]).toMatchObject({ outcome: 'fails', limit: 5, source: own }) // prettier-ignore
    const open = { ...on, site: plainSite({ covers: [] }) }
    expect(found('ingress-protection', {}, open)[0]?.outcome).toBe('fails')
    expect(found('ingress-protection', { ingressOpenSky: 4 }, open)[0]).toMatchObject({ limit: 4, source: own })
  })

  it('the distance of a bright glow from a step', () => {
    const bright = plainModel({ visibleGlow: 'bright' })
    const levels = [{ id: 'deck', name: 'deck', outline: [[0, 0], [6, 0], [6, 1], [0, 1]] as [number, number][], height: -0.17 }] // prettier-ignore
    const beside = { site: plainSite({ levels }), models: new Map([[bright.code, bright]]) }
    // The heater at y = 2 is 1 m from the edge at y = 1.
    expect(found('glow-near-step', {}, beside)[0]).toMatchObject({ outcome: 'fails', value: 1, limit: 2 })
    expect(found('glow-near-step', { glowNearStep: 0.9 }, beside)[0]).toMatchObject({ outcome: 'pass', source: own })
  })

  it('how far beside its member a chain may hang', () => {
    const silent = plainModel({ mountReach: {} })
    const aside = { layout: { heaters: [plainHeater({ y: 2.03 })] }, models: new Map([[silent.code, silent]]) }
    expect(found('supported', {}, aside)[0]?.outcome).toBe('fails')
    expect(found('supported', { chainSideways: 0.03 }, aside)[0]).toMatchObject({ outcome: 'pass', source: own })
  })
})

it('gives a splayed pair its reach and its angle', () => {
  const [beam] = plainSite().members
  const beamAt = (id: string, y: number) => ({ ...beam!, id, from: [0, y] as [number, number], to: [6, y] as [number, number], underside: { from: 4, to: 4 } }) // prettier-ignore
  const site = plainSite({ members: [beamAt('a', 2.5), beamAt('b', 1.5)] })
  const reason = (rules: Partial<HouseRules>) =>
    supportOf(site, plainHeater({ splayed: true }), model, { ...plainHouseRules, ...rules }).reason
  expect(reason({})).toBe('held')
  expect(reason({ splayReach: 0.49 })).toBe('out of reach')
  // Half a metre aside and 4 − 2.3 − 0.105 = 1.595 m up: 17.4° from plumb.
  expect([reason({ splayAngleDeg: 17.3 }), reason({ splayAngleDeg: 17.5 })]).toEqual(['splayed too flat', 'held'])
})

describe('a house’s own tolerances', () => {
  const rules: HouseRules = {
    ...plainHouseRules,
    toleranceLaser: 0.002,
    toleranceTape: 0.02,
    toleranceDrawing: 0.03,
    tolerancePhotoShare: 0.05,
    tolerancePhotoLeast: 0.08,
    toleranceGuessShare: 0.2,
    toleranceUnstated: 0.05,
  }

  it.each([
    ['laser', 4, 0.002],
    ['tape', 4, 0.02],
    ['drawing', 4, 0.03],
    ['photo', 4, 0.2],
    ['photo', 1, 0.08],
    ['told', 4, 0.8],
    ['guessed', 4, 0.8],
  ] as const)('%s of %d m: ± %d m', (source, value, tolerance) => {
    expect(usualTolerance(source, value, rules)).toBeCloseTo(tolerance, 9)
  })

  it('are those of a new job’s floor, of a template and of a photo', () => {
    const brief = { ...assumedBrief(rules), place: 'Here' }
    const asked = { name: 'Job', customer: '', displayUnits: 'metric' as const, floor: { length: 5, depth: 4 }, brief }
    expect(startingSite(asked, rules).dimensions.map(({ tolerance }) => tolerance)).toEqual([1, 0.8])
    const given = new Map(siteTemplates[0]!.sizes.map(({ key, usual }) => [key, usual]))
    const made = siteTemplates[0]!.start(given, 'tape', startingSite(asked, rules), rules)
    expect('error' in made || new Set(made.dimensions.map(({ tolerance }) => tolerance))).toEqual(new Set([0.02]))
    expect(photoTolerance(4, 0.001, rules)).toEqual({ tolerance: 0.2, by: 'share' })
    expect(photoTolerance(1, 0.001, rules)).toEqual({ tolerance: 0.08, by: 'least' })
  })

  it('are those of every size that nobody named: each share of a figure’s tolerance grows as they do', () => {
    // Nothing of the plain site is measured, and a hanger's length is linear in the heights of its cover: twice the
    // tolerance of each is twice its own.
    const hanger = hangScheduleOf(plainSite(), plainHeater(), model, plainHouse())!.hangers[0]!
    const lengthTolerance = (bare: number) => hangerTolerance(plainSite(), hanger, bare)!
    expect(lengthTolerance(0.05) / lengthTolerance(0.025)).toBeCloseTo(2, 6)
    expect(fluxTolerances(rules)).toMatchObject({ heaterPosition: 0.05, heaterHeight: 0.05, seat: 0.05 })
    const input = { site: plainSite(), brief: plainBrief(), layout, models, shade: 'none' as const }
    const places = (each: HouseRules) =>
      explainSeat(input, 'S1', { quantity: 'body' }, each)!.tolerance!.shares.filter(({ unit }) => unit === 'm')
    const [twice, once] = [places(rules), places(plainHouseRules)].map((shares) => new Map(shares.map(({ of, change }) => [of, change]))) // prettier-ignore
    expect(once!.size).toBeGreaterThan(5)
    for (const [of, change] of once!) expect(twice!.get(of), of).toBeCloseTo(2 * change, 6)
  })

  it('go into the findings of one and the same site, whoever asked before', () => {
    const site = plainSite()
    const near = { layout: { heaters: [plainHeater({ lowestPoint: 2.7 })] }, site }
    const tolerance = (each: Partial<HouseRules>) => found('hanger-length', each, near)[0]!.tolerance!
    const [first, second, again] = [tolerance({}), tolerance({ toleranceUnstated: 0.05 }), tolerance({})]
    expect(second / first).toBeCloseTo(2, 6)
    expect(again).toBe(first)
  })

  it('decide which things near a heater are in doubt, on one and the same site too', () => {
    // Half the body is 82.5 mm wide and the clearance at the side 300 mm: the shelves leave 100 and 120 mm more.
    const shelf = (id: string, from: number, to: number) => ({
      ...{ id, name: id, kind: 'other' as const, material: 'combustible' as const, movable: false, transmittance: 0, note: null },
      shape: { kind: 'box' as const, x: [2.9, 3.1] as [number, number], y: [from, to] as [number, number], z: [2.3, 2.4] as [number, number] },
    }) // prettier-ignore
    const [near, far] = [2 + 0.0825 + 0.3 + 0.1, 2 - 0.0825 - 0.3 - 0.12]
    const beside = { site: plainSite({ obstacles: [shelf('near', near, 3), shelf('far', 1, far)] }), layout: { heaters: [plainHeater()] } } // prettier-ignore
    const doubtful = (toleranceUnstated: number) =>
      found('clearance-side-end', { toleranceUnstated }, beside).filter(({ outcome }) => outcome === 'measure first')
    expect([0.025, 0.15, 0.025].map((each) => doubtful(each).length)).toEqual([0, 2, 0])
  })

  it('are those of a size that went along with what was placed by hand', () => {
    const size = { id: 's', label: 's', value: 1, tolerance: 0.001, source: 'laser' as const, note: null, moves: [{ of: 'seat' as const, id: 'S1', coordinate: 'x', by: 1 }] } // prettier-ignore
    const seat = { ...plainSite().seats[0]!, x: 1 }
    const site = plainSite({ seats: [seat], dimensions: [size] })
    const moved = { ...site, seats: [{ ...seat, x: 1.5 }] }
    expect(placedByHand(site, moved, rules).site.dimensions[0]!.tolerance).toBeCloseTo(0.3, 9)
  })

  it('go into what to measure next', () => {
    const question = { site: plainSite(), brief: plainBrief(), layout, models, house: { ...plainHouse(), rules } }
    expect(new Set(unstatedDoubts(question).map(({ size }) => size.tolerance))).toEqual(new Set([0.05]))
    const strict = { ...question, house: plainHouse({ supplyOverRated: 1 }) }
    const above = { layout: { title: 'One', heaters: [plainHeater({ supplyVoltage: 240, ratedVoltage: 230 })] } }
    const outcome = (asked: typeof question) =>
      [...weigh(unmoved({ ...asked, ...above })).checks.values()].find(({ rule }) => rule === 'voltage-offered')
        ?.outcome
    expect([outcome(question), outcome(strict)]).toEqual(['pass', 'fails'])
  })
})

it('starts a new job with the house’s own target', () => {
  const rules = { ...plainHouseRules, targetLow: 180, targetHigh: 300 }
  expect(assumedBrief(rules).target).toEqual({ low: 180, high: 300, source: own })
})
