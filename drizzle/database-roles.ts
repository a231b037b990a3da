import { createHmac } from 'node:crypto'
import type { Client } from 'pg'

/** Connection strings of the three database roles for one database. */
export interface DatabaseUrls {
  /** Owns the tables and the queue; runs migrations. Nothing to do with the owner of an organisation. */
  owner: string
  /** Reaches accounts, sessions and membership only. */
  auth: string
  /** Reaches the rows of one organisation at a time. */
  app: string
}

export const databaseRoles = ['owner', 'auth', 'app'] as const
type DatabaseRole = (typeof databaseRoles)[number]

/** Every role's password follows from the cluster's secret, so nothing but the secret is kept. */
function passwordOf(role: DatabaseRole, secret: string): string {
  return createHmac('sha256', secret).update(`inglefield_${role}`).digest('hex')
}

/** The three connection strings of a database of the local cluster. */
export function databaseUrls(secret: string, port: number, database: string): DatabaseUrls {
  const url = (role: DatabaseRole) =>
    `postgres://inglefield_${role}:${passwordOf(role, secret)}@127.0.0.1:${port}/${database}`
  return { owner: url('owner'), auth: url('auth'), app: url('app') }
}

/** Makes the roles if they are missing, with the same rights and passwords however often it runs. */
export async function ensureRoles(admin: Client, secret: string): Promise<void> {
  for (const role of databaseRoles) {
    const name = `inglefield_${role}`
    const exists = await admin.query('select 1 from pg_roles where rolname = $1', [name])
    if (exists.rowCount === 0) await admin.query(`create role ${name}`)
    await admin.query(
      `alter role ${name} login nosuperuser nobypassrls nocreatedb nocreaterole inherit password '${passwordOf(role, secret)}'`,
    )
  }
}

/** Makes an empty database that belongs to the owner role; an existing one is left as it is. */
export async function ensureDatabase(admin: Client, database: string): Promise<void> {
  const exists = await admin.query('select 1 from pg_database where datname = $1', [database])
  if (exists.rowCount !== 0) return
  const quoted = admin.escapeIdentifier(database)
  await admin.query(`create database ${quoted} owner inglefield_owner`)
  await admin.query(`revoke all on database ${quoted} from public`)
  await admin.query(`grant connect on database ${quoted} to inglefield_owner, inglefield_auth, inglefield_app`)
}

/** One row: whether the connected role is one that row-level security does not bind. */
export const roleDangerQuery = `select r.rolsuper or r.rolbypassrls
    or exists (select 1 from pg_class c where c.relowner = r.oid and c.relkind = 'r') as dangerous
  from pg_roles r where r.rolname = current_user`

/** What is said of such a role. */
export const roleDanger =
  'DATABASE_URL names a role that is a superuser, bypasses row-level security or owns tables. Give the application its own role.'
