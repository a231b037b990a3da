import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { z } from 'zod'
import { openApi, type ApiDesk, type Caller } from '#tests/support/api.ts'

const code = 'sanicle-1-6'
const path = `/api/heaters/${code}/beam`
const csv = 'deg,-90,0,90\n-90,1,1,1\n90,1,1,1\n'
const even = {
  kind: 'table',
  acrossDeg: [-90, 90],
  alongDeg: [-90, 0, 90],
  intensity: [
    [1, 1, 1],
    [1, 1, 1],
  ],
  source: 'Report 12',
}
const shownSchema = z.object({ code: z.string(), revision: z.number(), measured: z.boolean(), beam: z.unknown() })
const refusalSchema = z.object({
  error: z.string().min(1),
  path: z.string(),
  faults: z.array(z.object({ row: z.number(), column: z.number(), error: z.string() })).optional(),
  current: shownSchema.optional(),
  changed: z.object({ by: z.string().nullable(), at: z.iso.datetime() }).optional(),
})

let desk: ApiDesk
let engineer: Caller
beforeAll(async () => {
  desk = await openApi()
  engineer = desk.as('engineer')
})
afterAll(async () => {
  const { stopFluxThreads } = await import('#app/server/flux.server.ts')
  await stopFluxThreads()
  await desk.close()
})

const key = (): string => crypto.randomUUID()
const putCsv = (
  revision: number | null,
  text = csv,
  { who = engineer, source = 'Report 12', idempotency = key() } = {},
) =>
  who('PUT', `${path}?source=${encodeURIComponent(source)}`, {
    text,
    headers: {
      'Content-Type': 'text/csv',
      'Idempotency-Key': idempotency,
      ...(revision === null ? {} : { 'If-Match': `"${revision}"` }),
    },
  })
const putJson = (revision: number, body: unknown) =>
  engineer('PUT', path, { body, headers: { 'Idempotency-Key': key(), 'If-Match': `"${revision}"` } })
const drop = (revision: number, who = engineer) => who('DELETE', path, { headers: { 'If-Match': `"${revision}"` } })
const shown = async (who: Caller = engineer) => shownSchema.parse(await (await who('GET', path)).json())
const refusalOf = async (response: Response) => ({
  status: response.status,
  ...refusalSchema.parse(await response.json()),
})
const rowsOf = async (text: string) => (await desk.admin.query(text)).rows
const seats = async () => {
  const [{ id }] = await rowsOf(`select v.id from variants v where v.heaters::text like '%${code}%' limit 1`)
  return (await desk.as('designer')('GET', `/api/variants/${id}/seats.csv`)).text()
}

let bySheet: unknown
let seatsBySheet: string

describe('a measured beam', () => {
  it('is not there at first: the data sheet’s holds, at revision 0', async () => {
    const first = await shown()
    expect(first).toMatchObject({ code, revision: 0, measured: false, beam: { kind: 'angles' } })
    expect((await engineer('GET', path)).headers.get('ETag')).toBe('"0"')
    bySheet = first.beam
    await desk.admin.query(
      `update variants set heaters = jsonb_set(heaters, '{0,model}', to_jsonb('${code}'::text)) where number = 2`,
    )
    seatsBySheet = await seats()
  })

  it('is refused with every wrong place, in the terms of what was sent, and nothing is kept', async () => {
    const wrong = 'deg,-90,x,90\n-90,1,1,1\n\n0,-1,1,1\n'
    expect(await refusalOf(await putCsv(0, wrong))).toMatchObject({
      status: 400,
      path: 'row 1, column 3',
      faults: [
        { row: 1, column: 3 },
        { row: 3, column: 1, error: 'this line is empty' },
        { row: 4, column: 2 },
      ],
    })
    const inJson = async (change: object) => refusalOf(await putJson(0, { ...even, ...change }))
    expect(await inJson({ alongDeg: [-90, 0, 0] })).toMatchObject({ status: 400, path: 'alongDeg.2' })
    expect(await inJson({ acrossDeg: [100, 120] })).toMatchObject({ status: 400, path: 'acrossDeg.0' })
    expect(await inJson({ intensity: [[1, 1, 1], [1, 1]] })).toMatchObject({ status: 400, path: 'intensity.1.2' }) // prettier-ignore
    expect(await inJson({ intensity: [[1, 1, 1], [1, 1, 1], [1, 1, 1]] })).toMatchObject({ status: 400, path: 'acrossDeg.2' }) // prettier-ignore
    expect(await inJson({ intensity: [[1, 1, 1], [1, -1, 1]] })).toMatchObject({ status: 400, path: 'intensity.1.1' }) // prettier-ignore
    expect(await inJson({ source: '  ' })).toMatchObject({ status: 400, path: 'source' })
    expect(await inJson({ more: 1 })).toMatchObject({ status: 400, path: 'more' })
    expect(await refusalOf(await putCsv(0, csv, { source: '' }))).toMatchObject({ status: 400, path: 'source' })
    expect(await rowsOf('select 1 from heater_beams')).toEqual([])
  })

  it('is at most 1 MB, however long it says it is', async () => {
    const long = csv + ' '.repeat(1_000_000)
    expect((await putCsv(0, long)).status).toBe(413)
    const silent = engineer('PUT', `${path}?source=x`, {
      text: long,
      headers: { 'Content-Type': 'text/csv', 'Content-Length': '10', 'Idempotency-Key': key(), 'If-Match': '"0"' },
    })
    expect((await silent).status).toBe(413)
  })

  it('is given by an engineer or the owner alone, with a key and the revision', async () => {
    for (const role of ['designer', 'sales', 'installer'] as const) {
      expect((await putCsv(0, csv, { who: desk.as(role) })).status, role).toBe(403)
      expect((await drop(0, desk.as(role))).status, role).toBe(403)
    }
    expect((await putCsv(null)).status).toBe(428)
    expect((await putCsv(0, csv, { idempotency: '' })).status).toBe(400)
    expect((await putCsv(0, csv, { who: desk.as('nobody') })).status).toBe(401)
  })

  it('is kept once per key, with who, when, its hash and an event', async () => {
    const idempotency = key()
    const answers = await Promise.all([0, 0, 0].map((revision) => putCsv(revision, csv, { idempotency })))
    const texts = await Promise.all(answers.map((answer) => answer.text()))
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200])
    expect(new Set(texts).size).toBe(1)
    expect(answers[0]?.headers.get('ETag')).toBe('"1"')
    expect(await shown()).toEqual({ code, revision: 1, measured: true, beam: even })
    expect((await putCsv(1, csv.replace('1,1,1\n9', '1,1,2\n9'), { idempotency })).status).toBe(409)
    expect(
      await rowsOf(
        `select r.revision, r.body, u.email from heater_beam_revisions r join "user" u on u.id = r.author_id`,
      ),
    ).toEqual([{ revision: 1, body: even, email: 'engineer@inglefield.test' }])
    expect(await rowsOf(`select detail from audit_events where action = 'beam saved' and subject = 'heaters/${code}/beam'`)).toEqual([{ detail: { revision: 1 } }]) // prettier-ignore
  })

  it('two first beams at once: one is kept, the other hears of it', async () => {
    const other = `/api/heaters/betony-2-0/beam?source=x`
    const first = () =>
      engineer('PUT', other, {
        text: csv,
        headers: { 'Content-Type': 'text/csv', 'Idempotency-Key': key(), 'If-Match': '"0"' },
      })
    const statuses = (await Promise.all([first(), first(), first()])).map(({ status }) => status)
    expect(statuses.toSorted()).toEqual([200, 412, 412])
  })

  it('is not overwritten from an older revision: 412 with the copy, by whom and when', async () => {
    const [{ name }] = await rowsOf(`select name from "user" where email = 'engineer@inglefield.test'`)
    const stale = await refusalOf(await putCsv(0, csv, { who: desk.as('owner') }))
    expect(stale).toMatchObject({ status: 412, path: 'If-Match', current: { revision: 1 }, changed: { by: name } })
    expect((await drop(0)).status).toBe(412)
  })

  it('stands in the catalogue and under every figure of the organisation, and of no other', async () => {
    const schema = z.object({ heaters: z.array(z.looseObject({ code: z.string(), beam: z.unknown() })) })
    const beamIn = async (who: Caller) =>
      schema.parse(await (await who('GET', '/api/heaters')).json()).heaters.find((each) => each.code === code)?.beam
    expect(await beamIn(desk.as('sales'))).toEqual(even)
    expect(await beamIn(desk.as('other'))).toEqual(bySheet)
    expect(await shown(desk.as('other'))).toMatchObject({ revision: 0, measured: false })
    expect(await seats()).not.toBe(seatsBySheet)
  })

  it('radiates as an even beam does: E = Φ / (2π d √(d² + L²/4)) below the middle of the element', async () => {
    const [{ body }] = await rowsOf(`select body from heater_models where code = '${code}' limit 1`)
    const option = body.supplyOptions[0]
    const heater = { model: code, supplyVoltage: option.voltage, at: { x: 0, y: 0, z: 2.5 }, turnDeg: 0, tiltDeg: 0 }
    const answer = await engineer('POST', '/api/flux', {
      body: { heaters: [heater], points: [{ x: 0, y: 0, z: 0.5, normal: [0, 0, 1] }] },
    })
    const { irradiance } = z.object({ irradiance: z.array(z.number()) }).parse(await answer.json())
    const d = 2 + body.elementAboveLowest
    const power = option.ratedPower * body.radiantEfficiency
    expect(body.elementCount).toBe(1)
    const exact = power / (2 * Math.PI * d * Math.hypot(d, body.elementLength / 2))
    expect(irradiance[0]! / exact).toBeCloseTo(1, 6)
  })

  it('goes away as CSV that comes back as it was; the data sheet’s angles are written out', async () => {
    const download = await desk.as('sales')('GET', `${path}.csv`)
    expect(download.headers.get('Content-Type')).toBe('text/csv; charset=utf-8')
    expect(download.headers.get('Content-Disposition')).toContain('.csv"')
    expect((await putCsv(1, await download.text())).status).toBe(200)
    expect((await shown()).beam).toEqual(even)
    const sheet = await (await desk.as('other')('GET', `${path}.csv`)).text()
    const rows = sheet.trim().split('\r\n').map((line) => line.split(',').slice(1).map(Number)) // prettier-ignore
    const { acrossFullAngleDeg, alongFullAngleDeg } = z
      .object({ acrossFullAngleDeg: z.number(), alongFullAngleDeg: z.number() })
      .parse(bySheet)
    // By the definition of the half-intensity angle: 30° off the axis is (cos 30° / cos half)^… = 0.5^(ln cos 30° / ln cos half).
    const share = (full: number) =>
      0.5 ** (Math.log(Math.cos(Math.PI / 6)) / Math.log(Math.cos((full * Math.PI) / 360)))
    const column = rows[0]!.indexOf(30)
    const lineOf = (angle: number) => rows[1 + (angle + 90) / 5]!
    expect(lineOf(0)[rows[0]!.indexOf(0)]).toBe(1)
    expect(lineOf(30)[rows[0]!.indexOf(0)]).toBeCloseTo(share(acrossFullAngleDeg), 5)
    expect(lineOf(0)[column]).toBeCloseTo(share(alongFullAngleDeg), 5)
  })

  it('gives way to the data sheet’s again, as a revision of its own', async () => {
    const answer = await drop(2)
    expect([answer.status, answer.headers.get('ETag')]).toEqual([200, '"3"'])
    expect(await shown()).toEqual({ code, revision: 3, measured: false, beam: bySheet })
    expect(await seats()).toBe(seatsBySheet)
    expect((await drop(3)).headers.get('ETag')).toBe('"3"')
    expect(
      await rowsOf(
        `select revision, body is null as sheet from heater_beam_revisions where code = '${code}' order by 1`,
      ),
    ).toEqual([
      { revision: 1, sheet: false },
      { revision: 2, sheet: false },
      { revision: 3, sheet: true },
    ])
    expect(await rowsOf(`select detail from audit_events where action = 'beam taken back'`)).toEqual([
      { detail: { revision: 3 } },
    ])
    expect((await putJson(3, even)).headers.get('ETag')).toBe('"4"')
  })

  it('makes a model without beam data one that can be placed', async () => {
    const [{ code: dark }] = await rowsOf(`select code from heater_models where body -> 'beam' = 'null' limit 1`)
    expect((await engineer('GET', `/api/heaters/${dark}/beam.csv`)).status).toBe(404)
    const answer = await engineer('PUT', `/api/heaters/${dark}/beam?source=x`, {
      text: csv,
      headers: { 'Content-Type': 'text/csv', 'Idempotency-Key': key(), 'If-Match': '"0"' },
    })
    expect(answer.status).toBe(200)
    expect((await engineer('GET', `/api/heaters/${dark}/beam.csv`)).status).toBe(200)
  })

  it('belongs to a model of the organisation', async () => {
    for (const name of ['no-such', '%00', 'x'.repeat(200)]) {
      const answer = await engineer('GET', `/api/heaters/${name}/beam`)
      expect([answer.status, await answer.json()]).toEqual([404, { error: 'No such heater.', path: 'code' }])
    }
  })
})
