import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { Client } from 'pg'
import { type SeededDatabase, seededDatabase } from '#tests/support/seeded-database.ts'

/** Read before an organisation is known, by the role `auth` alone. */
const exempt = [
  'account',
  'invitation',
  'member',
  'organization',
  'session',
  'sign_in_attempts',
  'user',
  'verification',
]

let database: SeededDatabase
let admin: Client
beforeAll(async () => {
  database = await seededDatabase()
  admin = new Client({ connectionString: database.adminUrl })
  await admin.connect()
})
afterAll(async () => {
  await admin.end()
  await database.drop()
})

const rows = async (text: string, values: unknown[] = []) => (await admin.query(text, values)).rows
const tables = `select c.oid, c.relname, c.relrowsecurity, c.relforcerowsecurity, c.relowner::regrole::text as owner
  from pg_class c where c.relnamespace = 'public'::regnamespace and c.relkind in ('r', 'p')`

describe('the catalogue of the database', () => {
  it('has three roles that row-level security binds', async () => {
    expect(
      await rows(
        `select rolname, rolsuper, rolbypassrls, rolcreaterole, rolcreatedb from pg_roles where rolname like 'inglefield_%' order by 1`,
      ),
    ).toEqual(
      ['inglefield_app', 'inglefield_auth', 'inglefield_owner'].map((rolname) => ({
        rolname,
        rolsuper: false,
        rolbypassrls: false,
        rolcreaterole: false,
        rolcreatedb: false,
      })),
    )
    expect(await rows(`select 1 from pg_auth_members m where m.member::regrole::text like 'inglefield_%'`)).toEqual([])
  })

  it('belongs to the owner role altogether', async () => {
    expect((await rows(tables)).filter(({ owner }) => owner !== 'inglefield_owner')).toEqual([])
  })

  it('forces row-level security on every table that is not exempt by name', async () => {
    const open = (await rows(tables)).filter(
      ({ relrowsecurity, relforcerowsecurity }) => !relrowsecurity || !relforcerowsecurity,
    )
    expect(open.map(({ relname }) => relname).toSorted()).toEqual(exempt)
  })

  it('has an organisation in every row and in the key of every closed table', async () => {
    const closed = (await rows(tables)).filter(({ relname }) => !exempt.includes(relname))
    expect(closed.length).toBeGreaterThan(9)
    for (const { oid, relname } of closed) {
      const [column] = await rows(
        `select attnotnull, attnum from pg_attribute where attrelid = $1 and attname = 'organisation_id'`,
        [oid],
      )
      expect(column, relname).toMatchObject({ attnotnull: true })
      const [key] = await rows(`select conkey from pg_constraint where conrelid = $1 and contype = 'p'`, [oid])
      expect(key.conkey, relname).toContain(column.attnum)
    }
  })

  it('has the one policy, for reading and writing, and the named exceptions of the owner role', async () => {
    const policies = await rows(
      `select tablename, policyname, cmd, roles::text, qual, with_check from pg_policies order by tablename, policyname`,
    )
    const own = policies.filter(({ policyname }) => policyname === 'own_organisation')
    const text = "(organisation_id = (NULLIF(current_setting('app.org'::text, true), ''::text))::uuid)"
    expect(
      own.filter((p) => p.cmd !== 'ALL' || p.roles !== '{public}' || p.qual !== text || p.with_check !== text),
    ).toEqual([])
    const closed = (await rows(tables)).map(({ relname }) => relname).filter((name) => !exempt.includes(name))
    expect(own.map(({ tablename }) => tablename).toSorted()).toEqual(closed.toSorted())
    const others = policies.filter(({ policyname }) => policyname !== 'own_organisation')
    expect(others.map(({ tablename, policyname, cmd, roles }) => [tablename, policyname, cmd, roles])).toEqual([
      ['offer_links', 'token_lookup', 'SELECT', '{inglefield_owner}'],
      ['photos', 'sweep_look', 'SELECT', '{inglefield_owner}'],
      ['photos', 'sweep_old', 'DELETE', '{inglefield_owner}'],
      ['saved_answers', 'sweep_look', 'SELECT', '{inglefield_owner}'],
      ['saved_answers', 'sweep_old', 'DELETE', '{inglefield_owner}'],
    ])
  })

  it('carries the organisation through every reference between closed tables', async () => {
    const loose = await rows(
      `select con.conname from pg_constraint con
       where con.contype = 'f' and con.conrelid in (select oid from (${tables}) t where not relname = any($1))
         and con.confrelid in (select oid from (${tables}) t where not relname = any($1))
         and not exists (select 1 from pg_attribute a where a.attrelid = con.conrelid and a.attname = 'organisation_id' and a.attnum = any(con.conkey))`,
      [exempt],
    )
    expect(loose).toEqual([])
  })

  it('gives each role what it needs and the public nothing', async () => {
    const grants = await rows(
      `select grantee, table_name, string_agg(privilege_type, ' ' order by privilege_type) as may
       from information_schema.role_table_grants where table_schema = 'public' and grantee <> 'inglefield_owner' group by 1, 2`,
    )
    const of = (role: string) =>
      Object.fromEntries(grants.filter(({ grantee }) => grantee === role).map((g) => [g.table_name, g.may]))
    expect(new Set(grants.map(({ grantee }) => grantee))).toEqual(new Set(['inglefield_app', 'inglefield_auth']))
    expect(of('inglefield_auth')).toEqual(
      Object.fromEntries(exempt.map((name) => [name, 'DELETE INSERT SELECT UPDATE'])),
    )
    expect(of('inglefield_app')).toEqual({
      audit_events: 'INSERT SELECT',
      brief_revisions: 'INSERT SELECT',
      briefs: 'INSERT SELECT UPDATE',
      hanging_data: 'INSERT SELECT UPDATE',
      heater_beam_revisions: 'INSERT SELECT',
      heater_beams: 'INSERT SELECT UPDATE',
      heater_models: 'DELETE INSERT SELECT UPDATE',
      house_rules: 'INSERT SELECT UPDATE',
      jobs: 'INSERT SELECT UPDATE',
      offer_links: 'INSERT SELECT UPDATE',
      photos: 'INSERT SELECT UPDATE',
      rule_set_revisions: 'INSERT SELECT',
      rule_sets: 'INSERT SELECT UPDATE',
      saved_answers: 'DELETE INSERT SELECT UPDATE',
      site_revisions: 'INSERT SELECT',
      sites: 'INSERT SELECT UPDATE',
      variant_revisions: 'INSERT SELECT',
      variants: 'INSERT SELECT UPDATE',
    })
  })

  it('lets the application put work into the queue and read none of it', async () => {
    const may = await rows(
      `select has_table_privilege('inglefield_app', 'pgboss.job', 'insert') as put,
        has_column_privilege('inglefield_app', 'pgboss.job', 'data', 'select') as look,
        has_table_privilege('inglefield_app', 'pgboss.job', 'update') as change,
        has_table_privilege('inglefield_app', 'pgboss.job', 'delete') as remove`,
    )
    expect(may).toEqual([{ put: true, look: false, change: false, remove: false }])
  })

  it('has one function that runs as its owner, with a fixed search path, not for the public', async () => {
    const functions = await rows(
      `select proname, proconfig::text as config, has_function_privilege('inglefield_auth', oid, 'execute') as auth,
        has_function_privilege('inglefield_app', oid, 'execute') as app
       from pg_proc where pronamespace = 'public'::regnamespace and prosecdef`,
    )
    expect(functions).toEqual([
      { proname: 'find_offer_link', config: '{"search_path=pg_catalog, pg_temp"}', auth: false, app: true },
    ])
  })

  it('has no view that would look with its owner’s eyes', async () => {
    expect(
      await rows(
        `select relname from pg_class where relkind in ('v', 'm') and relnamespace = 'public'::regnamespace
         and not coalesce(reloptions::text like '%security_invoker=true%', false)`,
      ),
    ).toEqual([])
  })
})
