import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { PNG } from 'pngjs'
import { type Application, openApplication, type Person, requestOf } from '#tests/support/application.ts'

let application: Application
const cookies = new Map<Person, string>()
const jobs = new Map<string, string>()

beforeAll(async () => {
  application = await openApplication()
  for (const person of ['owner', 'designer', 'engineer', 'sales', 'installer', 'outsider'] as const) {
    cookies.set(person, await application.signInAs(person))
  }
  const { rows } = await application.admin.query('select id, name from jobs')
  for (const { id, name } of rows) jobs.set(name, id)
})
afterAll(() => application.close())

async function open(person: Person, path: string) {
  const response = await application.handle(requestOf('GET', path, { cookie: cookies.get(person) }))
  const html = await response.text()
  // What a reader sees: no scripts, no marks, entities read.
  const text = html
    .replace(/<script[\s\S]*?<\/script>/g, '')
    .replace(/<!-- -->/g, '')
    .replace(/<[^>]*>/g, ' ')
    .replace(/&#x27;/g, "'")
    .replace(/&quot;/g, '"')
    .replace(/&amp;/g, '&')
    .replace(/\s+/g, ' ')
  return { status: response.status, html, text, headers: response.headers }
}

const post = (person: Person, path: string, fields: Record<string, string>) =>
  application.handle(
    requestOf('POST', path, {
      cookie: cookies.get(person),
      body: new URLSearchParams(fields).toString(),
      headers: { 'Content-Type': 'application/x-www-form-urlencoded' },
    }),
  )

const jobCalled = (part: string) => [...jobs].find(([name]) => name.includes(part))?.[1] ?? ''
const countJobs = async () => Number((await application.admin.query('select count(*) from jobs')).rows[0].count)

describe('the list of jobs', () => {
  it('shows every job with its variants and their pictures', async () => {
    const { status, text, html } = await open('designer', '/jobs')
    expect(status).toBe(200)
    for (const name of jobs.keys()) if (!name.includes('Quillet')) expect(text).toContain(name)
    expect(html.match(/thumbnail\.svg\?revision=\d+/g)).toHaveLength(9)
    expect(text).toContain('40 seats')
  })

  it('finds by job, place and customer, whatever the case, and by stage', async () => {
    const found = await open('designer', '/jobs?q=tANSY')
    expect(found.text).toContain('The Tansy Weir')
    expect(found.text).not.toContain('Sallow Lane')
    expect((await open('designer', '/jobs?q=no-such-place')).text).toContain('No job fits.')
    expect((await open('designer', '/jobs?stage=installed')).text).not.toContain('The Tansy Weir, river')
  })

  it('says how a job starts where there is none', async () => {
    const { admin } = application
    const { rows } = await admin.query("insert into organization (name, slug) values ('New', 'new') returning id")
    const theirs = `user_id = (select id from "user" where email = 'owner@quillet.test')`
    const before = await admin.query(`select organization_id from member where ${theirs}`)
    await admin.query(`update member set organization_id = $1 where ${theirs}`, [rows[0].id])
    const { text, html } = await open('outsider', '/jobs')
    await admin.query(`update member set organization_id = $1 where ${theirs}`, [before.rows[0].organization_id])
    expect(text).toContain('No jobs yet')
    expect(html).toContain('href="/jobs/new"')
    expect((await open('outsider', '/jobs')).text).not.toContain('Tansy')
  })

  it('is not for an installer', async () => {
    const { status, text } = await open('installer', '/jobs')
    expect(status).toBe(403)
    expect(text).toContain('Your role does not open this page')
  })
})

const enquiry = {
  key: 'a-key-of-this-form',
  units: 'metric',
  name: 'Sedge Mill courtyard',
  place: 'Sedge Mill',
  customer: 'The miller',
  along: '8.4 m',
  deep: '5 m',
  airTemperature: '6',
  windDesign: '1.2',
  clothing: '1.3',
  supply: '400',
  sparePerPhase: '40, 32, 40',
  targetLow: '150',
  targetHigh: '350',
}

describe('a new enquiry', () => {
  it('is asked for on a page', async () => {
    const { status, html } = await open('sales', '/jobs/new')
    expect(status).toBe(200)
    expect(html).toMatch(/name="key" value="[0-9a-f-]{36}"/)
  })

  it('opens one job however often and at once it is sent', async () => {
    const before = await countJobs()
    const answers = await Promise.all(Array.from({ length: 6 }, () => post('sales', '/jobs/new', enquiry)))
    const places = answers.map((answer) => `${answer.status} ${answer.headers.get('Location')}`)
    expect(new Set(places).size).toBe(1)
    expect(places[0]).toMatch(/^302 \/jobs\/[0-9a-f-]{36}\/site$/)
    expect(await countJobs()).toBe(before + 1)
    const site = await open('designer', answers[0]?.headers.get('Location') ?? '')
    expect(site.text).toContain('Sedge Mill courtyard')
    expect(site.text).toContain('8.40 ± 0.84')
  })

  it('keeps what was typed and names each wrong answer beside its field and on top', async () => {
    const answer = await post('designer', '/jobs/new', {
      ...enquiry,
      key: 'another-key',
      name: '',
      airTemperature: '99',
    })
    const html = await answer.text()
    expect(answer.status).toBe(400)
    expect(html).toContain('href="#name"')
    expect(html).toContain('href="#airTemperature"')
    expect(html).toMatch(/id="airTemperature"[^>]*aria-invalid="true"|aria-invalid="true"[^>]*id="airTemperature"/)
    for (const kept of ['value="99"', 'value="Sedge Mill"', 'value="8.4 m"', 'value="another-key"']) {
      expect(html).toContain(kept)
    }
  })

  it('marks what nobody knows as assumed, and the brief says so', async () => {
    const unknown = {
      ...enquiry,
      key: 'unknown-answers',
      windDesign: '',
      'unknown-windDesign': 'on',
      'unknown-floor': 'on',
    }
    const answer = await post('designer', '/jobs/new', unknown)
    const id = /jobs\/([^/]+)\/site/.exec(answer.headers.get('Location') ?? '')?.[1] ?? ''
    const brief = await open('designer', `/jobs/${id}/brief`)
    expect(brief.text).toContain('Wind at the seats: 1 m/s')
    expect((await open('designer', `/jobs/${id}/site`)).text).toContain('6.00 ± 0.60')
  })

  it('refuses other answers under a used key, a body that is no form, and a role that opens no jobs', async () => {
    const before = await countJobs()
    const used = await post('sales', '/jobs/new', { ...enquiry, name: 'Something else' })
    expect(used.status).toBe(400)
    expect(await used.text()).toContain('This form was already sent with other answers.')
    const request = requestOf('POST', '/jobs/new', {
      cookie: cookies.get('designer'),
      body: '{"name":1}',
      headers: { 'Content-Type': 'application/json' },
    })
    expect((await application.handle(request)).status).toBe(400)
    expect((await post('installer', '/jobs/new', { ...enquiry, key: 'installers-key' })).status).toBe(403)
    expect(await countJobs()).toBe(before)
  })
})

describe('the pages of a job', () => {
  it('show the brief with every assumption', async () => {
    const { text, html } = await open('designer', `/jobs/${jobCalled('Tansy')}/brief`)
    expect(text).toContain('Gusts: 3 m/s')
    expect(text).toContain('Sky and surroundings: as the air')
    expect(html).toContain('value="40, 32, 40"')
  })

  it('show the site as a plan and a table, and to sales without the means to change it', async () => {
    const designer = await open('designer', `/jobs/${jobCalled('Tansy')}/site`)
    expect(designer.html.match(/data-seat="/g)).toHaveLength(40)
    expect(designer.html.match(/data-member="/g)).toHaveLength(6)
    expect(designer.text).toContain('Start anew')
    const sales = await open('sales', `/jobs/${jobCalled('Tansy')}/site`)
    expect(sales.text).toContain('You read this site')
    expect(sales.text).not.toContain('Start anew')
  })

  it.each(['brief', 'site', 'compare'])('give nothing of another organisation: %s', async (page) => {
    const foreign = await open('outsider', `/jobs/${jobCalled('Tansy')}/${page}`)
    expect(foreign.status).toBe(404)
    expect(foreign.text).toContain('Nothing at this address')
    expect(foreign.text).not.toContain('Tansy')
  })
})

describe('a comparison', () => {
  const titles = (text: string) => /Compare .*? Same scale/.exec(text)?.[0] ?? ''

  it('shows the variants asked for in their order, and the first two by default', async () => {
    const path = `/jobs/${jobCalled('Tansy')}/compare`
    const asked = await open('sales', `${path}?variants=3,1`)
    expect(titles(asked.text)).toContain('ends tilted in against One row')
    expect(titles((await open('sales', path)).text)).toContain('One row, bay centres against Two rows under')
    expect(asked.html).toContain('compare.png?variants=3,1')
    expect(asked.html).not.toContain('variants=2"')
  })

  it('says what is missing where there are too few', async () => {
    const id = [...(await application.admin.query("select id from jobs where name like 'Sedge%'")).rows][0]?.id
    expect((await open('designer', `/jobs/${id}/compare`)).text).toContain('Nothing to compare yet')
    expect((await open('designer', `/jobs/${id}/compare.png`)).status).toBe(404)
  })

  it('is taken away as a picture whose name says job and variants', async () => {
    const request = requestOf('GET', `/jobs/${jobCalled('Sallow')}/compare.png?variants=1,2`, {
      cookie: cookies.get('sales'),
    })
    const response = await application.handle(request)
    expect(response.status).toBe(200)
    expect(response.headers.get('Content-Disposition')).toMatch(
      /^attachment; filename="sallow-lane.*-variants-1-2\.png"$/,
    )
    const picture = PNG.sync.read(Buffer.from(await response.arrayBuffer()))
    expect(picture.width / picture.height).toBeCloseTo(297 / 210, 2) // A4 landscape, ISO 216
    const colours = new Set<number>()
    for (let i = 0; i < picture.data.length; i += 4) colours.add(picture.data.readUIntBE(i, 3))
    expect(colours.size).toBeGreaterThan(50)
  }, 60_000)

  it('is taken away as a drawing that stands alone under a policy of its own', async () => {
    const drawing = await open('engineer', `/jobs/${jobCalled('Sallow')}/compare.svg?variants=1,2`)
    expect(drawing.headers.get('Content-Type')).toContain('image/svg+xml')
    expect(drawing.headers.get('Content-Disposition')).toMatch(/attachment; .*\.svg/)
    expect(drawing.headers.get('Content-Security-Policy')).toBe(
      "default-src 'none'; style-src 'unsafe-inline'; font-src data:; sandbox",
    )
    expect(drawing.html.match(/@font-face/g)).toHaveLength(2)
    expect(drawing.html).not.toMatch(/<script|javascript:|href="http/)
    expect(drawing.text).toContain('thermal photograph')
    expect(drawing.text).toContain('Not yet checked')
  }, 60_000)

  it('is not for those who may not take it', async () => {
    expect((await open('installer', `/jobs/${jobCalled('Sallow')}/compare.png`)).status).toBe(403)
    expect((await open('outsider', `/jobs/${jobCalled('Sallow')}/compare.svg`)).status).toBe(404)
  })
})

describe('heaters, rules and team', () => {
  it('mark a withdrawn model and one without beam data with words', async () => {
    const { text } = await open('sales', '/heaters')
    expect(text).toContain('Withdrawn')
    expect(text).toContain('No beam data')
  })
  it('name the source of each house rule', async () => {
    const { text } = await open('engineer', '/rules')
    expect(text).toContain('house rule, no published source')
    expect(text).toContain('API Standard 521')
  })
  it('show addresses to those who manage people only', async () => {
    expect((await open('owner', '/team')).text).toContain('engineer@inglefield.test')
    const designer = await open('designer', '/team')
    expect(designer.text).toContain('Joss Harrow')
    expect(designer.text).not.toContain('@inglefield.test')
    expect((await open('outsider', '/team')).text).not.toContain('Joss Harrow')
  })
})

describe('the error page', () => {
  it('says what is safe and what to do, and keeps the paper that was chosen', async () => {
    const response = await application.handle(
      requestOf('GET', '/no/such/page', { cookie: `${cookies.get('designer')}; chrome=dark` }),
    )
    const html = await response.text()
    expect(response.status).toBe(404)
    expect(html).toContain('Nothing at this address')
    expect(html).toContain('Nothing was changed or lost.')
  })
  it('draws pages on the paper that was chosen', async () => {
    const dark = await application.handle(
      requestOf('GET', '/rules', { cookie: `${cookies.get('designer')}; chrome=dark` }),
    )
    expect(await dark.text()).toContain('data-chrome="dark"')
    expect((await open('designer', '/rules')).html).toContain('data-chrome="system"')
  })
})
