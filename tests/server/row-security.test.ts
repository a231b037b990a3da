import { createHash, randomBytes, randomUUID } from 'node:crypto'
import { Client } from 'pg'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type SeededDatabase, seededDatabase } from '#tests/support/seeded-database.ts'

let database: SeededDatabase
let admin: Client
let app: Client
let own: string
let other: string
let closed: string[]

beforeAll(async () => {
  database = await seededDatabase()
  admin = new Client({ connectionString: database.adminUrl })
  app = new Client({ connectionString: database.urls.app })
  await admin.connect()
  await app.connect()
  const organisations = await admin.query('select id, slug from organization')
  own = organisations.rows.find(({ slug }) => slug === 'osierfold').id
  other = organisations.rows.find(({ slug }) => slug === 'quillet').id
  const tables = await admin.query(`select relname from pg_class where relforcerowsecurity order by 1`)
  closed = tables.rows.map(({ relname }) => relname)
  const person = (await admin.query('select id from "user" limit 1')).rows[0].id
  for (const organisation of [own, other]) {
    const { id: variant, job_id: job } = (
      await admin.query('select id, job_id from variants where organisation_id = $1 limit 1', [organisation])
    ).rows[0]
    await admin.query(
      `insert into offer_links (organisation_id, job_id, variant_id, token_hash, expires_at, created_by) values ($1, $2, $3, $4, now() + interval '1 day', $5)`,
      [organisation, job, variant, hashOf(organisation), person],
    )
    await admin.query(
      `insert into saved_answers (organisation_id, person_id, resource, key, body_hash) values ($1, $2, 'r', 'k', 'h')`,
      [organisation, person],
    )
    await admin.query(
      `insert into house_rules (organisation_id, revision, body, updated_by) values ($1, 1, '{}', $2)`,
      [organisation, person],
    )
    const [{ code }] = (
      await admin.query('select code from heater_models where organisation_id = $1 limit 1', [organisation])
    ).rows
    await admin.query(`insert into heater_beams (organisation_id, code, revision, updated_by) values ($1, $2, 1, $3)`, [
      organisation,
      code,
      person,
    ])
    await admin.query(
      `insert into heater_beam_revisions (organisation_id, code, revision, content_hash, author_id) values ($1, $2, 1, 'h', $3)`,
      [organisation, code, person],
    )
    await admin.query(`insert into audit_events (organisation_id, action, subject) values ($1, 'a', 's')`, [
      organisation,
    ])
  }
})
afterAll(async () => {
  await app.end()
  await admin.end()
  await database.drop()
})

const hashOf = (token: string) => createHash('sha256').update(token).digest('hex')

/** Runs as the application's role for an organisation, with no filter of the application's, and rolls back. */
async function as(organisation: string | null, text: string, values: unknown[] = []) {
  await app.query('begin')
  try {
    if (organisation !== null) await app.query(`select set_config('app.org', $1, true)`, [organisation])
    return await app.query(text, values)
  } finally {
    await app.query('rollback')
  }
}

describe('row-level security alone, without any filter of the application', () => {
  it('shows each organisation its own rows of every table', async () => {
    expect(closed.length).toBeGreaterThan(9)
    for (const table of closed) {
      for (const organisation of [own, other]) {
        const seen = await as(organisation, `select distinct organisation_id from ${table}`)
        expect(seen.rows, table).toEqual([{ organisation_id: organisation }])
      }
    }
  })

  it('shows nothing where no organisation is said, or said as nothing', async () => {
    for (const table of closed) {
      expect((await as(null, `select 1 from ${table}`)).rowCount, table).toBe(0)
      expect((await as('', `select 1 from ${table}`)).rowCount, table).toBe(0)
    }
  })

  it('forgets the organisation with the transaction', async () => {
    await as(own, 'select 1')
    expect((await app.query('select 1 from jobs')).rowCount).toBe(0)
  })

  it('changes and removes no row of another organisation', async () => {
    const before = await admin.query(
      "select md5(string_agg(j::text, '' order by id)) as sum from jobs j where organisation_id = $1",
      [other],
    )
    for (const table of [
      'jobs',
      'sites',
      'briefs',
      'variants',
      'heater_models',
      'heater_beams',
      'offer_links',
      'saved_answers',
    ]) {
      const changed = await as(
        own,
        `update ${table} set organisation_id = organisation_id where organisation_id = $1`,
        [other],
      )
      expect(changed.rowCount, table).toBe(0)
    }
    for (const table of ['heater_models', 'saved_answers']) {
      expect((await as(own, `delete from ${table} where organisation_id = $1`, [other])).rowCount, table).toBe(0)
    }
    const after = await admin.query(
      "select md5(string_agg(j::text, '' order by id)) as sum from jobs j where organisation_id = $1",
      [other],
    )
    expect(after.rows).toEqual(before.rows)
  })

  it('puts no row into another organisation, nor moves one there', async () => {
    const text = `insert into jobs (organisation_id, name, customer, place) values ($1, 'n', 'c', 'p')`
    await expect(as(own, text, [other])).rejects.toThrow(/row-level security/)
    await expect(as(own, 'update jobs set organisation_id = $1', [other])).rejects.toThrow()
    expect((await as(own, text, [own])).rowCount).toBe(1)
  })

  it('refers to nothing of another organisation', async () => {
    const foreign = (await admin.query('select id from jobs where organisation_id = $1', [other])).rows[0].id
    const person = (await admin.query('select id from "user" limit 1')).rows[0].id
    const text = `insert into variants (organisation_id, job_id, number, title, revision, heaters, updated_by) values ($1, $2, 99, 't', 1, '[]', $3)`
    await expect(as(own, text, [own, foreign, person])).rejects.toThrow(/foreign key/)
  })

  it('keeps accounts from the application’s role and organisations’ rows from the accounts’ role', async () => {
    await expect(as(own, 'select 1 from "user"')).rejects.toThrow(/permission denied/)
    await expect(as(own, 'select 1 from session')).rejects.toThrow(/permission denied/)
    const auth = new Client({ connectionString: database.urls.auth })
    await auth.connect()
    for (const table of closed)
      await expect(auth.query(`select 1 from ${table}`), table).rejects.toThrow(/permission denied/)
    await auth.end()
  })
})

describe('what is kept for good', () => {
  const kept = [
    'site_revisions',
    'brief_revisions',
    'variant_revisions',
    'rule_set_revisions',
    'heater_beam_revisions',
    'audit_events',
  ]

  it.each(kept)('%s is neither changed nor removed by the application', async (table) => {
    await expect(as(own, `update ${table} set organisation_id = organisation_id`)).rejects.toThrow(/permission denied/)
    await expect(as(own, `delete from ${table}`)).rejects.toThrow(/permission denied/)
    await expect(as(own, `truncate ${table}`)).rejects.toThrow(/permission denied/)
  })

  it.each(kept)('%s is neither changed nor removed by a superuser in passing', async (table) => {
    await expect(admin.query(`update ${table} set organisation_id = organisation_id`)).rejects.toThrow(/kept for good/)
    await expect(admin.query(`delete from ${table}`)).rejects.toThrow(/kept for good/)
    await expect(admin.query(`truncate ${table}`)).rejects.toThrow(/kept for good/)
  })
})

describe('the token of an offer link', () => {
  const find = async (hash: string) => (await app.query('select * from find_offer_link($1)', [hash])).rows

  it('leads to its organisation and link, and to nothing else of it', async () => {
    const link = (await admin.query('select id from offer_links where organisation_id = $1', [own])).rows[0].id
    expect(await find(hashOf(own))).toEqual([{ organisation_id: own, link_id: link }])
  })

  it('is known by its hash only', async () => {
    expect(await find(own)).toEqual([])
    expect(await find(hashOf(randomBytes(32).toString('hex')))).toEqual([])
  })

  it('ends when it is revoked or has expired, like one that never was', async () => {
    await admin.query(`update offer_links set revoked_at = now() where organisation_id = $1`, [own])
    expect(await find(hashOf(own))).toEqual([])
    await admin.query(
      `update offer_links set revoked_at = null, expires_at = now() - interval '1 second' where organisation_id = $1`,
      [own],
    )
    expect(await find(hashOf(own))).toEqual([])
  })

  it('is of one organisation: the same hash cannot be kept twice', async () => {
    const { job_id, id } = (
      await admin.query('select job_id, id from variants where organisation_id = $1 limit 1', [other])
    ).rows[0]
    const person = (await admin.query('select id from "user" limit 1')).rows[0].id
    const text = `insert into offer_links (organisation_id, id, job_id, variant_id, token_hash, expires_at, created_by) values ($1, $2, $3, $4, $5, now(), $6)`
    await expect(admin.query(text, [other, randomUUID(), job_id, id, hashOf(own), person])).rejects.toThrow(/unique/)
  })
})
