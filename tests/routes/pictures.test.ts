import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type Application, openApplication, requestOf } from '#tests/support/application.ts'

let application: Application
let cookie = ''
let base = ''

beforeAll(async () => {
  application = await openApplication()
  cookie = await application.signInAs('sales')
  const { rows } = await application.admin.query(
    `select v.job_id, v.id from variants v join jobs j on j.id = v.job_id where j.name like 'The Tansy Weir%' and v.number = 3`,
  )
  base = `/jobs/${rows[0].job_id}/variants/${rows[0].id}/picture`
})
afterAll(() => application.close())

const get = (path: string) => application.handle(requestOf('GET', path, { cookie }))

describe('the picture of a variant in space', () => {
  it('goes out as a drawing that stands alone: whose it is, which revision, what is assumed, that it is calculated', async () => {
    const response = await get(`${base}.svg`)
    expect(response.status).toBe(200)
    expect(response.headers.get('Content-Disposition')).toMatch(/^attachment; filename="?the-tansy-weir.*\.svg/i)
    expect(response.headers.get('Content-Security-Policy')).toContain("default-src 'none'")
    const words = (await response.text()).replace(/<style[\s\S]*?<\/style>/g, '').replace(/<[^>]*>/g, ' ')
    for (const said of ['Osierfold Terrace Heating', 'not yet checked', 'Calculated, not a thermal photograph']) {
      expect(words).toContain(said)
    }
    // The demonstration's brief and beam spacing.
    expect(words).toMatch(/Assumed: .*beam spacing 2\.64 m ± 0\.025 m/)
    for (const heater of ['H1', 'H6', 'H12']) expect(words).toContain(heater)
  })

  it('and as a PNG of twice the size, other from another corner', async () => {
    const pictures = await Promise.all(
      ['lower+left', 'upper+right'].map(async (corner) => {
        const response = await get(`${base}.png?corner=${corner}`)
        expect(response.headers.get('Content-Type')).toBe('image/png')
        return Buffer.from(await response.arrayBuffer())
      }),
    )
    for (const picture of pictures) expect(await sharp(picture).metadata()).toMatchObject({ width: 2000, height: 1280 })
    expect(pictures[0]?.equals(pictures[1] ?? Buffer.alloc(0))).toBe(false)
  })

  it('is not there for a variant of another job', async () => {
    expect((await get(base.replace(/variants\/[^/]+/, `variants/${crypto.randomUUID()}`) + '.svg')).status).toBe(404)
  })
})
