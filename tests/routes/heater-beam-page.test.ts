import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type Application, openApplication, type Person, requestOf } from '#tests/support/application.ts'

const path = '/heaters/betony-3-0'
const csv = 'deg,-60,0,60\n-90,0,0,0\n0,0,1,0\n90,0,0,0\n'

let application: Application
const cookies = new Map<Person, string>()
beforeAll(async () => {
  application = await openApplication()
  for (const person of ['owner', 'designer', 'engineer', 'outsider'] as const) {
    cookies.set(person, await application.signInAs(person))
  }
})
afterAll(() => application.close())

const textOf = (html: string) =>
  html
    .replace(/<script[\s\S]*?<\/script>/g, '')
    .replace(/<!-- -->/g, '')
    .replace(/<[^>]*>/g, ' ')
    .replace(/\s+/g, ' ')

async function answered(response: Response) {
  const html = await response.text()
  return { status: response.status, html, text: textOf(html) }
}

const open = async (person: Person, address = path) =>
  answered(await application.handle(requestOf('GET', address, { cookie: cookies.get(person) })))

/** Sends the form as a browser does, with what is in its fields. */
async function send(person: Person, fields: Record<string, string | File>) {
  const form = new FormData()
  const whole = { revision: '0', key: crypto.randomUUID(), intent: 'save', source: 'Report 12', csv, ...fields }
  for (const [name, value] of Object.entries(whole)) form.append(name, value)
  const sent = new Request('http://none.test', { method: 'POST', body: form })
  return answered(
    await application.handle(
      requestOf('POST', path, {
        cookie: cookies.get(person),
        body: await sent.text(),
        headers: { 'Content-Type': sent.headers.get('Content-Type') ?? '' },
      }),
    ),
  )
}

const kept = async () =>
  (await application.admin.query('select revision, body from heater_beam_revisions order by 1')).rows

describe('the page of a heater', () => {
  it('is reached from the catalogue and shows the data sheet’s beam', async () => {
    expect((await open('designer', '/heaters')).html).toContain(`href="${path}"`)
    const { text, html } = await open('designer')
    // 85° × 95° by the data sheet; half to either side.
    expect(text).toContain('Beam 85° × 95°')
    expect(text).toContain('across 85°, from −42.5° to 42.5°')
    expect(text).toContain('along 95°, from −47.5° to 47.5°')
    // ln ½ / ln cos 42.5° and ln ½ / ln cos 47.5°.
    expect(text).toContain('2.27 across, 1.77 along')
    expect(html).toContain('href="/api/heaters/betony-3-0/beam.csv"')
    expect(html).not.toContain('name="csv"')
    expect((await open('engineer')).html).toContain('name="csv"')
    expect((await open('engineer', '/heaters/no-such')).status).toBe(404)
    expect((await open('designer', '/heaters/dulse-3-0')).text).toContain('No beam data Without a beam')
  })

  it('names each wrong place beside the table, keeps what was typed and stores nothing', async () => {
    const wrong = 'deg,-60,o,60\n-90,0,0,0\n\n90,0,0x1,0\n'
    const { status, text, html } = await send('engineer', { csv: wrong, source: '' })
    expect(status).toBe(400)
    for (const place of ['Row 1, column 3', 'Row 3, column 1: this line is empty', 'Row 4, column 3']) {
      expect(text).toContain(place)
    }
    expect(text).toContain('3 places are not right yet')
    expect(text).toContain('Say where the table comes from')
    expect(html).toContain('90,0,0x1,0')
    expect((await send('engineer', { csv: ' ' })).text).toContain('Paste a table, or choose a file.')
    expect((await send('engineer', { source: ' ' })).status).toBe(400)
    expect(await kept()).toEqual([])
  })

  it('is not sent by a designer, nor incomplete, nor longer than a table can be', async () => {
    expect((await send('designer', {})).status).toBe(403)
    expect((await send('engineer', { revision: 'x' })).text).toContain('The form is not complete')
    expect((await send('engineer', { key: '' })).status).toBe(400)
    const { status, html } = await send('engineer', { csv: csv + ' '.repeat(1_000_000) })
    expect([status, html.length < 500_000]).toEqual([413, true])
    expect(await kept()).toEqual([])
  })

  it('keeps a table, once for one form, and says who gave it', async () => {
    const key = crypto.randomUUID()
    const [first, again] = [await send('engineer', { key }), await send('engineer', { key })]
    expect([first.status, again.status]).toEqual([200, 200])
    expect(first.text).toContain('Saved.')
    expect(await kept()).toMatchObject([{ revision: 1, body: { kind: 'table', source: 'Report 12' } }])
    const { text } = await open('designer')
    expect(text).toContain('Beam measured: table of 3 × 3')
    // Straight from 1 to 0 over 90° and over 60°: a half at 45° and 30°.
    expect(text).toContain('across 90°, from −45° to 45°')
    expect(text).toContain('along 60°, from −30° to 30°')
    const { rows } = await application.admin.query(`select name from "user" where email = 'engineer@inglefield.test'`)
    expect(text).toContain(`Report 12 · revision 1, by ${rows[0].name}`)
    expect(text).toContain('The data sheet: 85° × 95°')
    expect((await open('designer', '/heaters')).text).toContain('measured: table of 3 × 3')
    expect((await open('outsider')).text).toContain('Beam 85° × 95°')
  })

  it('is not overwritten by one who saw an older revision: both, by whom, and from where it goes on', async () => {
    const four = 'deg,-60,0,60\n-90,0,0,0\n0,0,1,0\n45,0,1,0\n90,0,0,0\n'
    const { status, text, html } = await send('owner', { csv: four })
    expect(status).toBe(412)
    for (const words of ['Use measured: table of 3 × 3', 'Use measured: table of 4 × 3']) expect(text).toContain(words)
    expect(html).toContain('name="revision" value="0"')
    expect(html).toContain('45,0,1,0')
    const back = await send('owner', { intent: 'back' })
    expect([back.status, back.text.includes('Use the data sheet’s beam')]).toEqual([412, true])
    expect(await kept()).toHaveLength(1)
  })

  it('takes a file where the browser runs no scripts', async () => {
    const file = new File(['deg;-60;60\n-90;1;1\n90;1;1\n'], 'beam.csv', { type: 'text/csv' })
    const { status } = await send('owner', { file, csv: '', revision: '1' })
    expect(status).toBe(200)
    const { text } = await open('owner')
    expect(text).toContain('table of 2 × 2')
    // As bright at ±60° along as anywhere.
    expect(text).toContain('At its edge the table still has 100 % of the peak')
  })

  it('goes back to the data sheet’s beam, and every revision stays in the list', async () => {
    expect((await open('engineer')).html).toContain('value="back"')
    const { text } = await send('engineer', { intent: 'back', revision: '2', csv: '' })
    expect(text).toContain('The data sheet’s beam holds again.')
    const after = await open('engineer')
    expect(after.text).toContain('Beam 85° × 95°')
    expect(after.html).not.toContain('value="back"')
    const table = textOf(/<caption[^>]*>Revisions<.*?<\/table>/s.exec(after.html)![0])
    expect(table).toMatch(/ 3 .*the data sheet’s.* 2 .*table of 2 × 2.* 1 .*table of 3 × 3/)
    expect((await kept()).map(({ body }) => body === null)).toEqual([false, false, true])
  })
})
