import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { houseRuleValues } from '#app/domain/rules/house-rule-fields.ts'
import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { type Application, openApplication, type Person, requestOf } from '#tests/support/application.ts'

let application: Application
const cookies = new Map<Person, string>()
const ids: Record<string, string> = {}

beforeAll(async () => {
  application = await openApplication()
  for (const person of ['owner', 'designer', 'engineer', 'sales', 'installer', 'outsider'] as const) {
    cookies.set(person, await application.signInAs(person))
  }
  const { rows } = await application.admin.query(
    `select v.job_id as "jobId", v.id as "variantId" from variants v join jobs j on j.id = v.job_id
      where j.name like 'The Tansy Weir%' and v.number = 2`,
  )
  Object.assign(ids, rows[0])
})
afterAll(() => application.close())

async function open(person: Person, path: string) {
  const response = await application.handle(requestOf('GET', path, { cookie: cookies.get(person) }))
  const html = await response.text()
  const text = html.replace(/<!-- -->/g, '').replace(/<style.*?<\/style>/gs, '').replace(/<[^>]*>/g, ' ').replace(/\s+/g, ' ') // prettier-ignore
  return { status: response.status, html, text }
}

async function post(person: Person, path: string, fields: Record<string, string>) {
  const response = await application.handle(
    requestOf('POST', path, {
      cookie: cookies.get(person),
      body: new URLSearchParams(fields).toString(),
      headers: { 'Content-Type': 'application/x-www-form-urlencoded' },
    }),
  )
  return { status: response.status, location: response.headers.get('Location') ?? '', html: await response.text() }
}

const typed = houseRuleValues(plainHouseRules)
const save = (person: Person, revision: number, changes: Record<string, string>) =>
  post(person, '/rules/house', { ...typed, ...changes, revision: String(revision) })

async function rows() {
  const { rows: found } = await application.admin.query(
    `select o.slug, h.revision, h.body from house_rules h join organization o on o.id = h.organisation_id order by o.slug`,
  )
  return found
}

describe('house rules', () => {
  it('are those of the product until an organisation decides otherwise', async () => {
    expect(await rows()).toEqual([])
    const { text, html } = await open('designer', '/rules/house')
    expect(text).toContain('As by default')
    expect(html).toContain('name="toleranceLaser" value="0.005 m"')
  })

  it('are refused beside the field with its range, and nothing typed is lost', async () => {
    const { status, html } = await save('engineer', 0, { toleranceTape: '0', headCautionLongStay: 'hot', splayReach: '80 cm' }) // prettier-ignore
    expect(status).toBe(400)
    expect(html).toContain('Between 0.001 m and 0.10 m.')
    for (const kept of ['value="hot"', 'value="80 cm"', 'href="#toleranceTape"']) expect(html).toContain(kept)
    expect(await rows()).toEqual([])
  })

  it('are changed by an engineer and written down for good, for this organisation alone', async () => {
    const changes = { toleranceGuessShare: '20', toleranceUnstated: '40 mm', headCautionLongStay: '300', targetLow: '180' } // prettier-ignore
    const { status, html } = await save('engineer', 0, changes)
    expect([status, html.includes('Saved.')]).toEqual([200, true])
    const body = { ...plainHouseRules, toleranceGuessShare: 0.2, toleranceUnstated: 0.04, headCautionLongStay: 300, targetLow: 180 } // prettier-ignore
    expect(await rows()).toEqual([{ slug: 'osierfold', revision: 1, body }])
    const { rows: events } = await application.admin.query(`select detail from audit_events where action = 'house rules saved'`) // prettier-ignore
    expect(events).toEqual([{ detail: { revision: 1, ...body } }])
    expect((await open('outsider', '/rules/house')).html).toContain('name="headCautionLongStay" value="600"')
  })

  it('stand in Rules with whose they are, beside what no house changes', async () => {
    const { text } = await open('sales', '/rules')
    expect(text).toMatch(/Head caution, long stay 300 W\/m².*?house rule, set by this organisation/)
    expect(text).toMatch(/Head caution, short stay 1000 W\/m².*?house caution; no published limit was found/)
    expect(text).toContain('no organisation changes these here')
  })

  it('are not overwritten by one who saw an older revision: both values, who, and from where it goes on', async () => {
    const { status, html } = await save('owner', 0, { headCautionLongStay: '500' })
    expect(status).toBe(412)
    const { rows: found } = await application.admin.query(`select name from "user" where email = 'engineer@inglefield.test'`) // prettier-ignore
    expect(html).toContain(`Saved by ${found[0].name}`)
    for (const value of ['Use <!-- -->300', 'Use <!-- -->500']) expect(html).toContain(value)
    expect(html).toContain('name="revision" value="0"')
    expect((await rows())[0].revision).toBe(1)
  })

  it('are read by designers and sales, changed by neither', async () => {
    for (const person of ['designer', 'sales'] as const) {
      expect((await open(person, '/rules/house')).text).toContain('An engineer or the owner changes them.')
      expect((await save(person, 1, {})).status).toBe(403)
    }
    expect((await save('installer', 1, {})).status).toBe(403)
    expect((await rows())[0].revision).toBe(1)
  })
})

describe('what an organisation decided', () => {
  it('starts a new job: its target and the tolerance of sizes that are told', async () => {
    const form = await open('designer', '/jobs/new')
    expect(form.text).toContain('180 to 350 W/m²: house rule, set by this organisation.')
    const key = /name="key" value="([^"]+)"/.exec(form.html)![1]!
    const enquiry = { key, name: 'Teal Yard', place: 'Teal', customer: '', units: 'metric', along: '6 m', deep: '4 m', clothing: '1.3', supply: '400', sparePerPhase: '32', airTemperature: '8', windDesign: '1', 'unknown-targetLow': 'on', 'unknown-targetHigh': 'on' } // prettier-ignore
    const { rows: [first] } = await application.admin.query(`select body from briefs limit 1`) // prettier-ignore
    expect(first.body.target.low).not.toBe(180)
    const made = await post('designer', '/jobs/new', enquiry)
    expect(made.status, made.html.slice(0, 400)).toBe(302)
    const jobId = /jobs\/([^/]+)\/site/.exec(made.location)![1]
    const { rows: [kept] } = await application.admin.query(`select s.body as site, b.body as brief from sites s join briefs b using (job_id) where job_id = $1`, [jobId]) // prettier-ignore
    expect(kept.site.dimensions.map(({ tolerance }: { tolerance: number }) => tolerance)).toEqual([1.2, 0.8])
    expect(kept.brief.target).toEqual({ low: 180, high: 350, source: 'house rule, set by this organisation' })
  })

  it('goes to every page that reckons in the browser', async () => {
    const { jobId, variantId } = ids
    const photo = await application.admin.query(`select id, job_id from photos limit 1`)
    const paths = [`/jobs/${jobId}/variants/${variantId}`, `/jobs/${jobId}/variants/${variantId}/sizes`, `/jobs/${jobId}/variants/${variantId}/hang`, `/jobs/${jobId}/compare`, `/jobs/${jobId}/site`, `/jobs/${photo.rows[0].job_id}/photos/${photo.rows[0].id}`] // prettier-ignore
    for (const path of paths) {
      const own = await open('owner', path)
      // The page's data: each name and each value once, wherever it is first said.
      expect(own.html, path).toContain('toleranceGuessShare')
      expect(own.html, path).toMatch(/\\"headCautionLongStay\\",300\b/)
    }
  })

  it('is what the picture of a comparison is reckoned with: cautions and hangers', async () => {
    const compare = async () => (await open('owner', `/jobs/${ids['jobId']}/compare.svg?variants=1,2`)).text
    const before = await compare()
    expect(before).toContain('over the caution of 300')
    expect(before).not.toMatch(/may not be installed as it stands: [^.]*level/i)
    const { rows: [hanging] } = await application.admin.query(`select revision from hanging_data h join organization o on o.id = h.organisation_id where o.slug = 'osierfold'`) // prettier-ignore
    // Links of 200 mm and no turnbuckle leave a slope of the cover in the element's axis.
    const chain = { linkPitch: '200 mm', hardwareAllowance: '95 mm', shortens: '0 mm', lengthens: '0 mm', rodStep: '5 mm', safetySlack: '0.1 m', orderStep: '1 m' } // prettier-ignore
    expect((await post('engineer', '/rules/hanging', { ...chain, revision: String(hanging.revision) })).status).toBe(
      200,
    )
    expect(await compare()).toMatch(/may not be installed as it stands: [^.]*level/i)
  }, 60_000)

  it('is what the API explains a tolerance with', async () => {
    const { rows: seats } = await application.admin.query(`select body -> 'seats' -> 0 ->> 'id' as id from sites where job_id = $1`, [ids['jobId']]) // prettier-ignore
    const path = `/api/variants/${ids['variantId']}/seats/${seats[0].id}/explain?quantity=body`
    const explained = async () => {
      const response = await application.handle(requestOf('GET', path, { cookie: cookies.get('designer') }))
      const { tolerance } = await response.json()
      return new Map<string, number>(tolerance.shares.map(({ of, tolerance: by }: { of: string; tolerance: number }) => [of, by])) // prettier-ignore
    }
    const heights = [...(await explained())].filter(([of]) => of.endsWith(' height') && of.startsWith('H'))
    expect(heights.length).toBeGreaterThan(2)
    expect(new Set(heights.map(([, by]) => by))).toEqual(new Set([0.04]))
  })
})
