import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { plainHouse } from '#tests/support/plain-site.ts'
import { describe, expect, it } from 'vitest'
import { askFor, chosenVariants } from '#app/domain/comparison/chosen-variants.ts'
import { countByModel, tightestMargin, type ComparedVariant } from '#app/domain/comparison/compared-variant.ts'
import { differencesInWords } from '#app/domain/comparison/in-words.ts'
import { layoutFigures } from '#app/domain/comparison/layout-figures.ts'
import { listPriceOf } from '#app/domain/comparison/list-price.ts'
import { sheetCautions } from '#app/domain/comparison/sheet-cautions.ts'
import { comparisonRows } from '#app/domain/comparison/what-differs.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'

const models = new Map(demoModels().map((model) => [model.code, model]))
const demo = demoSites().find(({ key }) => key === 'A')!
const { site, brief } = demo
const terms = { units: 'metric' as const, target: brief.target, overlapThreshold: 80 }

function variantOf(number: number, layout: Layout, overlap: number | null = null): ComparedVariant {
  const figures = layoutFigures({ site, brief, layout, models, house: plainHouse() })
  return { number, title: layout.title, layout, models, ...figures, price: listPriceOf(layout, models, 'EUR'), overlap }
}

const second = variantOf(2, demo.variants[1]!.layout, 13.3)
const third = variantOf(3, demo.variants[2]!.layout, 7.7)
const empty = variantOf(4, { title: 'Nothing yet', heaters: [] }, 0)
const rowsOf = (...variants: ComparedVariant[]) =>
  new Map(comparisonRows(variants, terms).map((row) => [row.name, row]))

describe('the figures side by side', () => {
  it('say so where the coldest and the hottest seat are of the primary ones alone', () => {
    const others = { ...third, warmth: third.warmth.map((each, i) => (i > 0 ? each : { ...each, seat: { ...each.seat, priority: 'secondary' as const } })) } // prettier-ignore
    expect([...rowsOf(second, third).keys()]).toEqual(expect.arrayContaining(['Coldest seat', 'Hottest seat']))
    expect([...rowsOf(second, others).keys()]).toEqual(expect.arrayContaining(['Coldest primary seat', 'Hottest primary seat'])) // prettier-ignore
  })
  const rows = rowsOf(second, third)
  const texts = (name: string) => rows.get(name)?.cells.map(({ text }) => text)
  const better = (name: string) => rows.get(name)?.cells.map((cell) => cell.better)

  it('say what the layouts are, from the demonstration’s own numbers', () => {
    expect(texts('Heaters')).toEqual(['8 × Betony 3.0', '12 × Betony 2.0'])
    expect(texts('Lowest point')).toEqual(['2.45 m', '2.35 m'])
    expect(texts('Power')).toEqual(['24.0 kW', '24.0 kW'])
    expect(texts('Tilted')).toEqual(['none, straight down', '4 of them, 22°'])
  })

  it('put the better in bold, and nothing where both are the same or neither can be better', () => {
    expect(better('Seats in target')).toEqual([false, true])
    expect(better('Evenness, min ÷ mean')).toEqual([false, true])
    expect(better('Heaters, list price before tax')).toEqual([true, false])
    expect(better('Power')).toEqual([false, false])
    expect(better('Spacing')).toEqual([false, false])
    expect(rows.get('Power')?.same).toBe(true)
  })

  it('mark the coldest seat that misses the target', () => {
    expect(rows.get('Coldest seat')?.cells.map(({ outcome }) => outcome)).toEqual(['fails', null])
  })

  it('show a dash, never a number, for a layout without heaters', () => {
    const cells = comparisonRows([second, empty], terms).map(({ name, cells: [, cell] }) => [name, cell?.text])
    for (const [name, text] of cells) {
      if (name === 'Overlap, each alone ≥ 80 W/m²') expect(text).toBe('0.0 m²')
      else if (name !== 'Findings' && name !== 'Tightest margin') expect([name, text]).toEqual([name, '–'])
      expect(text).not.toMatch(/NaN|Infinity|undefined/)
    }
    expect(cells.length).toBeGreaterThan(12)
  })

  it('turn over when the order does', () => {
    const turned = rowsOf(third, second)
    for (const [name, row] of rows) expect(turned.get(name)?.cells).toEqual(row.cells.toReversed())
  })
})

describe('what differs in words', () => {
  it('names heaters, height, spacing, tilt, seats, overlap and findings', () => {
    const words = differencesInWords(second, third, terms).join(' ')
    expect(words).toContain('12 × Betony 2.0 instead of 8 × Betony 3.0.')
    expect(words).toContain('Lowest point 0.10 m lower, at 2.35 m.')
    expect(words).toContain('2.46 m and 2.64 m along instead of 2.64 m')
    expect(words).toContain('4 tilted, up to 22°.')
    expect(words).toMatch(/\d+ more seats in target\./)
    expect(words).toContain('Overlap 5.6 m² smaller.')
    expect(words).not.toContain('kW')
  })
  it('says how many checks fail, none included; one that finds the same of two heaters counts once', () => {
    const failing = (rule: string, id: string) => ({
      ...second.findings[0]!,
      rule,
      outcome: 'fails' as const,
      subject: { kind: 'heater' as const, id },
    })
    const twice = { ...second, findings: [failing('a', 'H1'), failing('a', 'H2'), failing('b', 'H1')] }
    const none = { ...second, findings: [] }
    const once = { ...second, findings: [failing('a', 'H1')] }
    expect(differencesInWords(twice, none, terms)).toEqual(['No check fails instead of 2.'])
    expect(differencesInWords(none, once, terms)).toEqual(['1 check fails instead of none.'])
  })
  it('says nothing of two that are the same', () => {
    expect(differencesInWords(second, { ...second, number: 5 }, terms)).toEqual([])
  })
  it('has words for the way to and from no heaters', () => {
    expect(differencesInWords(second, empty, terms)[0]).toBe('No heater instead of 8 × Betony 3.0.')
    expect(differencesInWords(empty, second, terms)[0]).toBe('8 × Betony 3.0 instead of no heater.')
  })
})

describe('the tightest margin', () => {
  const finding = (margin: number | null, rule = 'clearance-above', unit: Finding['unit'] = 'm'): Finding => ({
    rule,
    outcome: 'pass',
    weight: 'hard stop',
    subject: { kind: 'heater', id: 'H1' },
    title: 't',
    margin,
    tolerance: 0,
    value: null,
    limit: null,
    unit,
    source: 's',
    condition: null,
    remedy: null,
    nearest: null,
  })
  it('is the least length, over the limit or under it, and not what has no margin, another unit or a support’s reach', () => {
    const found = tightestMargin([
      finding(0.2),
      finding(null),
      finding(-0.1),
      finding(-9, 'voltage-offered', 'V'),
      finding(-1, 'supported'),
    ])
    expect(found?.margin).toBe(-0.1)
    expect(tightestMargin([finding(null)])).toBeNull()
  })
})

describe('heaters by model', () => {
  it('are counted, the most first', () => {
    const heaters = [...third.layout.heaters, ...second.layout.heaters.slice(0, 2)]
    expect(countByModel({ layout: { title: '', heaters }, models }).map(({ count }) => count)).toEqual([12, 2])
  })
})

describe('the variants that an address asks for', () => {
  it.each([
    ['1,3', [1, 2, 3], [1, 3]],
    ['3,1', [1, 2, 3], [3, 1]],
    [null, [1, 2, 3], [1, 2]],
    ['2', [1, 2, 3], [2, 1]],
    ['2,2,9', [1, 2, 3], [2, 1]],
    ['1,2,3,4,5', [1, 2, 3, 4, 5], [1, 2, 3, 4]],
    ['x,<script>,-1', [2, 5], [2, 5]],
    ['1', [1], []],
    [null, [], []],
  ])('%s of %j are %j', (asked, existing, expected) => {
    expect(chosenVariants(asked, existing)).toEqual(expected)
  })
  it('are asked for again by the address they make', () => {
    expect(chosenVariants(new URLSearchParams(askFor([3, 1])).get('variants'), [1, 2, 3])).toEqual([3, 1])
  })
})

describe('the cautions of a sheet', () => {
  const cautions = sheetCautions({
    brief,
    rules: plainHouseRules,
    models,
    units: 'metric',
    site,
    variants: [second, third],
  }).join('\n')
  it('name the clearances of the manuals, what is assumed, what it feels like without heat and who approves', () => {
    expect(cautions).toContain('variant 2, 0.45 m at the ends, 0.45 m above, 1.30 m in front')
    expect(cautions).toContain('variant 3, 0.40 m at the ends, 0.35 m above, 1.10 m in front')
    expect(cautions).toContain('Assumed: Gusts: 3 m/s')
    expect(cautions).toContain('beam spacing 2.64 m ± 0.025 m')
    expect(cautions).not.toContain('terrace length')
    expect(cautions).toContain('out of the wind')
    expect(cautions).toContain('No figure approves')
  })
  it('promise nothing', () => expect(cautions).not.toMatch(/comfort|guarantee|coverage|perfect/i))
})
