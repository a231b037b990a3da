import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type Application, openApplication, type Person, requestOf } from '#tests/support/application.ts'

let application: Application
const cookies = new Map<Person, string>()
let jobId = ''
const variants = new Map<number, string>()

beforeAll(async () => {
  application = await openApplication()
  for (const person of ['owner', 'designer', 'engineer', 'sales', 'installer', 'outsider'] as const) {
    cookies.set(person, await application.signInAs(person))
  }
  const { rows } = await application.admin.query(
    `select v.job_id, v.id, v.number from variants v join jobs j on j.id = v.job_id where j.name like 'The Tansy Weir%'`,
  )
  for (const { job_id, id, number } of rows) {
    jobId = job_id
    variants.set(number, id)
  }
})
afterAll(() => application.close())

async function open(person: Person, path: string) {
  const response = await application.handle(requestOf('GET', path, { cookie: cookies.get(person) }))
  const html = await response.text()
  const text = html
    .replace(/<script[\s\S]*?<\/script>/g, '')
    .replace(/<!-- -->/g, '')
    .replace(/<[^>]*>/g, ' ')
    .replace(/&#x27;/g, "'")
    .replace(/\s+/g, ' ')
  return { status: response.status, text, html }
}
const sheet = (number: number) => `/jobs/${jobId}/variants/${variants.get(number)}/hang`

describe('the hang schedule of a variant', () => {
  it('gives each eye of the demonstration its links, its turnbuckle and its heights', async () => {
    const { status, text } = await open('engineer', sheet(2))
    expect(status).toBe(200)
    // The author's schedule of variant 2, wall row: 618/523/19/-9 and 556/461/16/13 mm; river row 364/269/10, 302/207/7.
    expect(text).toContain('1 2.64 m, 1.146 m beam 1 3.183 m ± 49 618 95 523 19 532 9 shorter')
    expect(text).toMatch(/2 2\.64 m, 1\.754 m beam 1 3\.121 m ± \d+ 556 95 461 16 448 13 longer/)
    expect(text).toMatch(/364 95 269 10 280 11 shorter/)
    expect(text).toContain('whole links alone −2.1°')
    expect(text).toContain('The manual asks for level within 4°')
    // (19 + 16 + 10 + 7) links of 28 mm, four times: 5.824 m.
    expect(text).toContain('Chain of 28 mm pitch: 6.00 m')
    expect(text).toContain('Not yet checked')
  })

  it('says what each member carries and that nobody knows what it allows', async () => {
    const { text } = await open('engineer', sheet(2))
    // 4.9 kg: 48 N, half at each of two eyes, two heaters to a beam.
    expect(text).toContain('beam 1, aluminium box beam 120 x 60 H1, H2 4 24 N 48 N 96 N – not known')
  })

  it('names the conditions of use: what must not stand open while a heater is on', async () => {
    const { rows } = await application.admin.query(
      `select v.job_id, v.id from variants v join jobs j on j.id = v.job_id where j.name like 'Sallow Lane%' and v.number = 2`,
    )
    const { text } = await open('engineer', `/jobs/${rows[0].job_id}/variants/${rows[0].id}/hang`)
    // The demonstration expects of H2 that the open door leaf is in its beam.
    expect(text).toContain('Condition of use: H2 off while outward-opening door leaf, 2.04 m high: open.')
    expect((await open('engineer', sheet(3))).text).not.toContain('Condition of use')
  })

  it('says beside each heater what concerns it alone, and above them what concerns all', async () => {
    const { html } = await open('engineer', sheet(2))
    const heaters = [...html.matchAll(/<section aria-label="Heater (H\d+)".*?<\/section>/gs)].map(([section, id]) => [id, section.replace(/<!-- -->/g, '').replace(/<[^>]*>/g, '')] as const) // prettier-ignore
    expect(heaters.map(([id]) => id)).toEqual(['H1', 'H2', 'H3', 'H4', 'H5', 'H6', 'H7', 'H8'])
    // Two heaters to a beam: H1 and H2 on the first, H3 and H4 on the second, …
    for (const [i, [id, section]] of heaters.entries()) {
      const beam = Math.floor(i / 2) + 1
      expect(section, id).toContain(`structure: Load on beam ${beam} is not known. It must not carry the heater`)
      for (const other of [1, 2, 3, 4].filter((each) => each !== beam)) expect(section).not.toContain(`Load on beam ${other}`) // prettier-ignore
    }
    const all = /aria-labelledby="cautions".*?<\/section>/s.exec(html)![0]
    expect(all).toContain('Falling heater: each has its secondary safety line')
    expect(all).not.toMatch(/beam \d/)
  })

  it('shows what is not held as not to be hung', async () => {
    const { text } = await open('engineer', sheet(1))
    expect(text.match(/No member above it\. Not to be hung as drawn/g)).toHaveLength(5)
    expect(text).toContain('Nothing is hung.')
  })

  it('is linked from its variant, and printable', async () => {
    const { html } = await open('designer', `/jobs/${jobId}/variants/${variants.get(2)}`)
    expect(html).toContain(`href="${sheet(2)}"`)
    expect((await open('designer', sheet(2))).html).toContain('print:table-header-group')
  })

  it('is read by those who read jobs; an installer has no job assigned, and others have none of it', async () => {
    for (const person of ['owner', 'designer', 'engineer', 'sales'] as const) {
      expect((await open(person, sheet(3))).status, person).toBe(200)
    }
    expect((await open('installer', sheet(3))).status).toBe(403)
    expect((await open('outsider', sheet(3))).status).toBe(404)
    expect((await open('owner', `/jobs/${jobId}/variants/no-such/hang`)).status).toBe(404)
  })
})
