import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { z } from 'zod'
import { openApi, type ApiDesk, type Caller } from '#tests/support/api.ts'
import reference from '#tests/published/demo-reference.json'

const jobsSchema = z.object({ jobs: z.array(z.looseObject({ id: z.string(), name: z.string() })) })
const variantsSchema = z.object({ variants: z.array(z.looseObject({ id: z.string(), number: z.number() })) })
const names = { A: 'The Tansy Weir, river terrace', B: 'Hotel Quillfinch, roof bar', C: 'Sallow Lane veranda' }

let desk: ApiDesk
let designer: Caller
const jobIds: Record<string, string> = {}
beforeAll(async () => {
  desk = await openApi()
  designer = desk.as('designer')
  const { jobs } = jobsSchema.parse(await (await designer('GET', '/api/jobs')).json())
  for (const [letter, name] of Object.entries(names)) jobIds[letter] = jobs.find((job) => job.name === name)!.id
})
afterAll(() => desk.close())

async function variantIds(letter: string): Promise<Map<number, string>> {
  const response = await designer('GET', `/api/jobs/${jobIds[letter]}/variants`)
  return new Map(variantsSchema.parse(await response.json()).variants.map(({ number, id }) => [number, id]))
}
async function csvOf(variantId: string): Promise<{ header: string[]; rows: string[][]; response: Response }> {
  const response = await designer('GET', `/api/variants/${variantId}/seats.csv`)
  const [header = '', ...rows] = (await response.clone().text()).trimEnd().split('\r\n')
  return { header: header.split(','), rows: rows.map((row) => row.split(',')), response }
}
const seat = (id: string, x: number) => ({
  id,
  group: id,
  priority: 'primary',
  posture: 'seated',
  x,
  y: 1,
  facingDeg: 0,
  bodyHeight: 0.6,
  headHeight: 1.1,
})

describe('jobs', () => {
  it('are listed newest first with the variant saved last', async () => {
    const { jobs } = await (await designer('GET', '/api/jobs')).json()
    expect(jobs.map(({ name }: { name: string }) => name)).toEqual([names.A, names.B, names.C])
    expect(jobs[0]).toMatchObject({ stage: 'variants', newest: { revision: 1 } })
  })

  it('show site, seats with ids, brief and the revisions of both', async () => {
    const job = await (await designer('GET', `/api/jobs/${jobIds['B']}`)).json()
    expect(job.seats).toHaveLength(34)
    expect(job.seats[0]).toMatchObject({ id: 'L1-1', facingDeg: 28, priority: 'primary' })
    expect(job.site.poles).toHaveLength(6)
    expect(job.brief).toMatchObject({ airTemperature: 7.2, supply: { lineVoltage: 208 } })
    expect(job.revisions).toEqual({ site: 1, brief: 1 })
    expect(job).not.toHaveProperty('member')
  })

  it('the catalogue has eleven models', async () => {
    const { heaters } = await (await designer('GET', '/api/heaters')).json()
    expect(heaters).toHaveLength(11)
    expect(heaters[0]).toMatchObject({ code: 'betony-1-5', elementLength: 0.367 })
  })
})

describe('what is another organisation’s', () => {
  it('is as unknown as what never was, on every address', async () => {
    const other = desk.as('other')
    const variantId = (await variantIds('A')).get(1)!
    const random = crypto.randomUUID()
    const addresses = (job: string, variant: string) => [
      `/api/jobs/${job}`,
      `/api/jobs/${job}/site`,
      `/api/jobs/${job}/brief`,
      `/api/jobs/${job}/variants`,
      `/api/variants/${variant}`,
      `/api/variants/${variant}/revisions`,
      `/api/variants/${variant}/seats.csv`,
      `/api/variants/${variant}/thumbnail.svg`,
      `/api/variants/${variant}/seats/R1-1/explain`,
    ]
    const foreign = addresses(jobIds['A']!, variantId)
    for (const [index, unknown] of addresses(random, random).entries()) {
      const [one, two] = [await other('GET', foreign[index]!), await other('GET', unknown)]
      expect(one.status, unknown).toBe(404)
      expect(await one.text()).toBe(await two.text())
      expect((await designer('GET', foreign[index]!)).status, foreign[index]).toBe(200)
      expect((await desk.as('nobody')('GET', foreign[index]!)).status).toBe(401)
      expect((await desk.as('installer')('GET', foreign[index]!)).status).toBe(403)
    }
    const { jobs } = jobsSchema.parse(await (await other('GET', '/api/jobs')).json())
    expect(jobs.map(({ name }) => name)).toEqual(['Quillet House, garden room'])
  })
})

describe('seats.csv', () => {
  it('has the fourteen columns and a row for each seat, as a download', async () => {
    const { header, rows, response } = await csvOf((await variantIds('A')).get(3)!)
    expect(header).toEqual([
      'seat',
      'group',
      'priority',
      'x m',
      'y m',
      'body W/m²',
      'head W/m² (largest direction)',
      'feels-like calm before °C',
      'feels-like calm after °C',
      'feels-like design before °C',
      'feels-like design after °C',
      'feels-like gust before °C',
      'feels-like gust after °C',
      'target',
    ])
    expect(rows).toHaveLength(40)
    expect(response.headers.get('Content-Type')).toBe('text/csv; charset=utf-8')
    expect(response.headers.get('Content-Disposition')).toBe(
      'attachment; filename="the-tansy-weir-river-terrace-3-1-seats.csv"',
    )
  })

  it.each(reference.sites.flatMap(({ site, variants }) => variants.map((variant) => ({ site, ...variant }))))(
    '$site $number: body plane within 1 % or 1 W/m² of the independent model',
    async ({ site, number, reference: { perSeat } }) => {
      const { rows } = await csvOf((await variantIds(site)).get(number)!)
      const body = new Map(rows.map((row) => [row[0], Number(row[5])]))
      for (const { seat: id, bodyHorizontalWm2 } of perSeat) {
        expect(Math.abs(body.get(id)! - bodyHorizontalWm2), id).toBeLessThanOrEqual(
          Math.max(1, bodyHorizontalWm2 * 0.01),
        )
      }
    },
  )

  it('feels-like without heat or wind is the air temperature, without heaters the figures of heat are empty', async () => {
    const made = await designer('POST', `/api/jobs/${jobIds['C']}/variants`, {
      body: { title: 'Nothing yet' },
      headers: { 'Idempotency-Key': crypto.randomUUID() },
    })
    const { id } = z.looseObject({ id: z.string() }).parse(await made.json())
    const { rows } = await csvOf(id)
    const [first] = rows
    expect(first!.slice(5, 7)).toEqual(['', ''])
    // 11 °C in the brief; 0.2 m/s is almost still air, and t_eq equals t_a in still air by its definition.
    expect(Math.abs(Number(first![7]) - 11)).toBeLessThan(0.6)
    expect(first![8]).toBe('')
    expect(first!.at(-1)).toBe('no heater')
  })

  it('marks text that a spreadsheet would run, and leaves negative figures numbers', async () => {
    const job = await (await designer('GET', `/api/jobs/${jobIds['C']}`)).json()
    const names = ['=1+2', '+1', '-1', '@a', '\tb', '\rc', 'say "two, three"', 'plain']
    const site = { ...job.site, seats: names.map((name, index) => seat(name, -index)) }
    const saved = await designer('PUT', `/api/jobs/${jobIds['C']}/site`, {
      body: site,
      headers: { 'If-Match': '"1"', 'Idempotency-Key': crypto.randomUUID() },
    })
    expect(saved.status).toBe(200)
    const response = await designer('GET', `/api/variants/${(await variantIds('C')).get(1)}/seats.csv`)
    const text = await response.text()
    for (const start of ["'=1+2,", "'+1,", "'-1,", "'@a,", "'\tb,", '"\'\rc",', '"say ""two, three""",', 'plain,']) {
      expect(text).toContain(`\n${start}`)
    }
    expect(text).toContain(',-1.0000,1.0000,')
  })
})

describe('thumbnail.svg', () => {
  it('is a plan of its own with heat, every seat and every heater, and runs nothing', async () => {
    const response = await designer('GET', `/api/variants/${(await variantIds('A')).get(3)}/thumbnail.svg`)
    expect(response.headers.get('Content-Type')).toBe('image/svg+xml')
    expect(response.headers.get('Content-Security-Policy')).toMatch(/^default-src 'none'.*sandbox$/)
    const svg = await response.text()
    expect(svg).toMatch(/^<svg xmlns="http:\/\/www.w3.org\/2000\/svg"/)
    expect(svg).not.toMatch(/<script|href=|on[a-z]+=/)
    expect(svg.match(/<circle[^>]*r="1.3"/g)).toHaveLength(40)
    expect(svg.match(/<rect[^>]*rotate\(/g)).toHaveLength(12)
    expect(svg.match(/<path/g)!.length).toBeGreaterThan(10)
  })

  it('is drawn anew when the variant changes, and without heaters has no heat', async () => {
    const made = await designer('POST', `/api/jobs/${jobIds['A']}/variants`, {
      body: { copyOf: (await variantIds('A')).get(2) },
      headers: { 'Idempotency-Key': crypto.randomUUID() },
    })
    const { id } = z.looseObject({ id: z.string() }).parse(await made.json())
    const read = async () => (await designer('GET', `/api/variants/${id}/thumbnail.svg`)).text()
    const before = await read()
    expect(await read()).toBe(before)
    await designer('PUT', `/api/variants/${id}`, {
      body: { title: 'Empty', heaters: [] },
      headers: { 'If-Match': '"1"', 'Idempotency-Key': crypto.randomUUID() },
    })
    const after = await read()
    expect(after.match(/<rect[^>]*rotate\(/g)).toBeNull()
    expect(after.length).toBeLessThan(before.length / 2)
  })
})

describe('a figure explained', () => {
  it('is the same figure as in the CSV, and its parts add up to it', async () => {
    const variantId = (await variantIds('A')).get(2)!
    const { rows } = await csvOf(variantId)
    const row = rows.find(([id]) => id === 'W3-2')!
    const explained = await (
      await designer('GET', `/api/variants/${variantId}/seats/W3-2/explain?quantity=head`)
    ).json()
    expect(explained.value).toBeCloseTo(Number(row[6]), 2)
    const sum = explained.parts.reduce((total: number, part: { value: number }) => total + part.value, 0)
    expect(sum + explained.base).toBeCloseTo(explained.value, 6)
  })

  it('says without shade that it is so, and with shade what the seat sees of each heater', async () => {
    const address = `/api/variants/${(await variantIds('A')).get(2)!}/seats/W3-2/explain`
    const of = async (query: string) => (await designer('GET', `${address}?${query}`)).json()
    expect(await of('quantity=body')).toMatchObject({ shade: 'none', seen: null })
    for (const shade of ['in-place', 'away']) {
      const explained = await of(`quantity=body-largest&shade=${shade}`)
      expect(explained).toMatchObject({ shade, figure: { quantity: 'body-largest' } })
      expect(explained.seen.length).toBeGreaterThan(0)
      for (const { seen, past } of explained.seen) expect(seen < 1).toBe(past.length > 0)
      const sum = explained.parts.reduce((total: number, part: { value: number }) => total + part.value, 0)
      expect(sum).toBeCloseTo(explained.value, 6)
    }
  })

  it.each(['near-infrared', 'head-to-body', 'feels-like&wind=gust', 'sensation&wind=calm'])(
    'answers for ?quantity=%s',
    async (query) => {
      const variantId = (await variantIds('A')).get(2)!
      const response = await designer('GET', `/api/variants/${variantId}/seats/W3-2/explain?quantity=${query}`)
      const explained = await response.json()
      expect(response.status).toBe(200)
      expect(explained.figure.quantity).toBe(query.split('&')[0])
      expect(explained.formula).not.toBe('')
    },
  )

  it.each([
    ['quantity=colour', 'quantity'],
    ['quantity=feels-like', 'wind'],
    ['quantity=feels-like&wind=storm', 'wind'],
    ['quantity=sensation', 'wind'],
    ['wind=calm', 'wind'],
    ['shade=dark', 'shade'],
    ['quantity=head&shade=in place', 'shade'],
  ])('400 for ?%s', async (query, path) => {
    const variantId = (await variantIds('A')).get(2)!
    const response = await designer('GET', `/api/variants/${variantId}/seats/W3-2/explain?${query}`)
    expect({ status: response.status, ...(await response.json()) }).toMatchObject({ status: 400, path })
  })

  it('404 for a seat the site does not have', async () => {
    const response = await designer('GET', `/api/variants/${(await variantIds('A')).get(2)}/seats/none/explain`)
    expect({ status: response.status, ...(await response.json()) }).toMatchObject({ status: 404, path: 'seatId' })
  })
})
