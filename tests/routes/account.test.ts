import { createHmac } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type Application, openApplication, requestOf } from '#tests/support/application.ts'

const password = 'warm-terrace-demo'
let application: Application
beforeAll(async () => {
  application = await openApplication()
})
afterAll(() => application.close())

const form = (path: string, fields: Record<string, string>, cookie?: string) =>
  application.handle(
    requestOf('POST', path, {
      cookie,
      body: new URLSearchParams(fields).toString(),
      headers: { 'Content-Type': 'application/x-www-form-urlencoded' },
    }),
  )
const signIn = (email: string, typed = password, path = '/sign-in') => form(path, { email, password: typed })
const cookieOf = (response: Response) => response.headers.getSetCookie()[0]?.split(';')[0]
const statusOf = async (cookie: string | undefined, path = '/api/jobs') =>
  (await application.handle(requestOf('GET', path, { cookie }))).status

describe('signing in', () => {
  it('sets a session cookie that scripts cannot read and goes on to the jobs', async () => {
    const response = await signIn('designer@inglefield.test')
    expect([response.status, response.headers.get('Location')]).toEqual([302, '/jobs'])
    expect(response.headers.getSetCookie()[0]).toMatch(
      /^inglefield\.session_token=.*; Path=\/; HttpOnly; SameSite=Lax$/,
    )
    expect(await statusOf(cookieOf(response))).toBe(200)
  })

  it.each([
    ['/jobs/new', '/jobs/new'],
    ['//evil.example', '/jobs'],
    ['https://evil.example', '/jobs'],
    ['/\\evil.example', '/jobs'],
  ])('goes on from next=%s to %s', async (next, location) => {
    const path = `/sign-in?next=${encodeURIComponent(next)}`
    expect((await signIn('designer@inglefield.test', password, path)).headers.get('Location')).toBe(location)
  })

  it('says the same of a wrong password and of an unknown address, and keeps the address typed', async () => {
    const wrong = await signIn('engineer@inglefield.test', 'wrong')
    const unknown = await signIn('nobody@inglefield.test', 'wrong')
    expect([wrong.status, unknown.status]).toEqual([401, 401])
    const [a, b] = [await wrong.text(), await unknown.text()]
    expect(a).toContain('value="engineer@inglefield.test"')
    expect(a).not.toContain('value="wrong"')
    const same = (html: string) => html.replace(/nonce="[^"]*"|(engineer|nobody)@inglefield\.test/g, '')
    expect(same(a)).toBe(same(b))
    expect([wrong, unknown].flatMap((response) => response.headers.getSetCookie())).toEqual([])
  })

  it.each([
    [{ email: 'no address', password }, 'An address such as'],
    [{ email: 'designer@inglefield.test', password: '' }, 'Type the password.'],
    [{ email: 'x'.repeat(300), password }, 'At most 254 characters.'],
  ])('refuses %j beside its field', async (fields, words) => {
    const response = await form('/sign-in', fields)
    expect(response.status).toBe(400)
    expect(await response.text()).toContain(words)
  })

  it('refuses a body that is no form', async () => {
    const response = await application.handle(
      requestOf('POST', '/sign-in', {
        body: '{"email":"designer@inglefield.test"}',
        headers: { 'Content-Type': 'application/json' },
      }),
    )
    expect(response.status).toBe(400)
  })

  it('looks at ten wrong passwords of an account in a quarter of an hour, known or not', async () => {
    for (const email of ['owner@quillet.test', 'unknown@quillet.test']) {
      const statuses: number[] = []
      for (let round = 0; round < 5; round++) {
        const address = round % 2 ? email : email.toUpperCase()
        const tries = await Promise.all(Array.from({ length: 20 }, (_, i) => signIn(address, `wrong ${i}`)))
        statuses.push(...tries.map(({ status }) => status))
      }
      expect(statuses.filter((status) => status === 401)).toHaveLength(10)
      expect(statuses.filter((status) => status === 429)).toHaveLength(90)
    }
    expect((await signIn('owner@quillet.test')).status).toBe(429)
    expect((await signIn('sales@inglefield.test')).status).toBe(302)
  }, 60_000)

  it('looks again when the quarter of an hour is over', async () => {
    await application.admin.query(
      `update sign_in_attempts set checked_at = array(select t - interval '15 minutes' from unnest(checked_at) t)`,
    )
    expect((await signIn('owner@quillet.test')).status).toBe(302)
  })

  it('does not count right passwords', async () => {
    for (let i = 0; i < 12; i++) expect((await signIn('sales@inglefield.test')).status).toBe(302)
  }, 60_000)
})

describe('a session', () => {
  it('ends with signing out, on this device only', async () => {
    const [here, there] = [await application.signInAs('designer'), await application.signInAs('designer')]
    const response = await form('/sign-out', {}, here)
    expect(response.headers.get('Location')).toBe('/sign-in')
    expect(response.headers.getSetCookie().join()).toMatch(/session_token=; Max-Age=0/)
    expect([await statusOf(here), await statusOf(there)]).toEqual([401, 200])
  })

  it('is not ended by a link', async () => {
    const cookie = await application.signInAs('designer')
    await application.handle(requestOf('GET', '/sign-out', { cookie }))
    expect(await statusOf(cookie)).toBe(200)
  })

  it.each([
    [
      'another signature',
      (cookie: string) =>
        cookie.replace(/\.[^.]*$/, `.${encodeURIComponent(createHmac('sha256', 'x').update('y').digest('base64'))}`),
    ],
    ['no signature', (cookie: string) => cookie.replace(/\.[^.]*$/, '')],
    [
      'another token',
      (cookie: string) =>
        cookie.replace(/session_token=(.)/, (_, first) => `session_token=${first === 'a' ? 'b' : 'a'}`),
    ],
    ['an empty value', () => 'inglefield.session_token='],
  ])('is not believed with %s', async (_, forge) => {
    const cookie = await application.signInAs('designer')
    expect(await statusOf(cookie)).toBe(200)
    expect(await statusOf(forge(cookie))).toBe(401)
  })

  it('changes its role and its organisation with the very next request', async () => {
    const cookie = await application.signInAs('installer')
    const asks = () => statusOf(cookie)
    const set = (text: string) =>
      application.admin.query(
        `${text} where user_id = (select id from "user" where email = 'installer@inglefield.test')`,
      )
    expect(await asks()).toBe(403)
    await set(`update member set role = 'designer'`)
    expect(await asks()).toBe(200)
    await set(`update session set active_organization_id = (select id from organization where slug = 'osierfold')`)
    await set('delete from member')
    expect(await asks()).toBe(403)
    expect(await statusOf(cookie, '/jobs')).toBe(403)
  })
})

describe('a new password', () => {
  const letters = async () => {
    const { startWork } = await import('#app/server/jobs/work.server.ts')
    const { listKeptMail } = await import('#app/server/outside/mail.server.ts')
    const work = await startWork()
    const waiting = async () =>
      (
        await application.admin.query(
          `select 1 from pgboss.job where name = 'mail' and state not in ('completed', 'failed')`,
        )
      ).rowCount
    for (let tries = 0; tries < 100 && (await waiting()); tries++) await new Promise((done) => setTimeout(done, 100))
    await work.stop()
    return listKeptMail()
  }

  it('is asked for alike by a known and an unknown address; only the known one gets a letter', async () => {
    const known = await form('/reset-password', { email: 'engineer@inglefield.test' })
    const unknown = await form('/reset-password', { email: 'nobody@inglefield.test' })
    expect([known.status, unknown.status]).toEqual([200, 200])
    const same = async (response: Response) =>
      (await response.text()).replace(/nonce="[^"]*"|(engineer|nobody)@inglefield\.test/g, '')
    expect(await same(known)).toBe(await same(unknown))
    expect((await letters()).map(({ to }) => to)).toEqual(['engineer@inglefield.test'])
  }, 30_000)

  it('is set once by the link in the letter, and ends every session', async () => {
    const cookie = await application.signInAs('engineer')
    const [letter] = await letters()
    const path = /http:\/\/127\.0\.0\.1:3000(\/reset-password\/\S+)/.exec(letter!.text)![1]!
    const kept = await application.admin.query('select identifier from verification')
    expect(JSON.stringify(kept.rows)).not.toContain(path.split('/').at(-1))
    expect((await form(path, { password: 'too short' })).status).toBe(400)
    expect((await form(path, { password: 'x'.repeat(129) })).status).toBe(400)
    expect(await (await form(path, { password: 'a long enough one' })).text()).toContain('The password is changed')
    expect(await statusOf(cookie)).toBe(401)
    expect((await signIn('engineer@inglefield.test')).status).toBe(401)
    expect((await signIn('engineer@inglefield.test', 'a long enough one')).status).toBe(302)
    expect(await (await form(path, { password: 'another long one' })).text()).toContain('This link has ended')
  }, 30_000)

  it('is not set by a link that never was or is too old', async () => {
    expect((await form('/reset-password/never-was', { password: 'a long enough one' })).status).toBe(400)
    await form('/reset-password', { email: 'sales@inglefield.test' })
    const letter = (await letters()).find(({ to }) => to === 'sales@inglefield.test')
    const path = /(\/reset-password\/\S+)/.exec(letter!.text)![1]!
    await application.admin.query(`update verification set expires_at = now() - interval '1 second'`)
    expect((await form(path, { password: 'a long enough one' })).status).toBe(400)
  }, 30_000)

  it('sends at most five letters to an address in a quarter of an hour', async () => {
    for (let i = 0; i < 8; i++) await form('/reset-password', { email: 'owner@inglefield.test' })
    const sent = await application.admin.query(
      `select count(*)::int as n from pgboss.job where name = 'mail' and data->>'to' = 'owner@inglefield.test'`,
    )
    expect(sent.rows[0].n).toBe(5)
  })

  it('can be read in the outbox in development only', async () => {
    expect((await application.handle(requestOf('GET', '/outbox'))).status).toBe(404)
  })
})
