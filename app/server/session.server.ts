import { createHmac, timingSafeEqual } from 'node:crypto'
import { getSessionCookie } from 'better-auth/cookies'
import { and, asc, desc, eq, gt, sql } from 'drizzle-orm'
import { redirect } from 'react-router'
import { z } from 'zod'
import { type Action, type Role, can, roles } from '#app/domain/access/roles.ts'
import { authDatabase } from '#app/server/db.server.ts'
import { isRefusedDemo } from '#app/server/demo-address.server.ts'
import { env } from '#app/server/env.server.ts'
import { member, organization, session, user } from '#drizzle/accounts-schema.ts'

/** A signed-in person in one organisation. */
export interface Member {
  userId: string
  name: string
  email: string
  organisationId: string
  organisationName: string
  role: Role
}

const rowSchema = z.object({
  userId: z.string(),
  name: z.string(),
  email: z.string(),
  organisationId: z.string().nullable(),
  organisationName: z.string().nullable(),
  role: z.enum(roles).nullable(),
})

/** The session's token, if the cookie carries our signature. */
function tokenOf(request: Request): string | null {
  const cookie = getSessionCookie(request, { cookiePrefix: 'inglefield' })
  if (!cookie) return null
  const dot = cookie.lastIndexOf('.')
  const token = cookie.slice(0, dot)
  const given = Buffer.from(cookie.slice(dot + 1), 'base64')
  const expected = createHmac('sha256', env.SESSION_SECRET).update(token).digest()
  return dot > 0 && given.length === expected.length && timingSafeEqual(given, expected) ? token : null
}

/** Session, person and membership as they are now, in one statement: nothing is believed from an earlier request. */
async function findRow(token: string) {
  const [row] = await authDatabase
    .select({
      userId: user.id,
      name: user.name,
      email: user.email,
      organisationId: member.organizationId,
      organisationName: organization.name,
      role: member.role,
    })
    .from(session)
    .innerJoin(user, eq(user.id, session.userId))
    .leftJoin(member, eq(member.userId, user.id))
    .leftJoin(organization, eq(organization.id, member.organizationId))
    .where(and(eq(session.token, token), gt(session.expiresAt, new Date())))
    .orderBy(
      desc(sql`${member.organizationId} is not distinct from ${session.activeOrganizationId}`),
      asc(member.createdAt),
    )
    .limit(1)
  return row ? rowSchema.parse(row) : null
}

type Standing = Member | 'signed out' | 'no organisation'
const standings = new WeakMap<Request, Promise<Standing>>()

async function readStanding(request: Request): Promise<Standing> {
  const token = tokenOf(request)
  const row = token === null ? null : await findRow(token)
  if (!row || isRefusedDemo(row.email)) return 'signed out'
  const { organisationId, organisationName, role } = row
  if (organisationId === null || organisationName === null || role === null) return 'no organisation'
  return { ...row, organisationId, organisationName, role }
}

/** The member who sends the request, or null. Asked of the database once per request. */
export async function findMember(request: Request): Promise<Member | null> {
  const standing = await standingOf(request)
  return typeof standing === 'string' ? null : standing
}

async function standingOf(request: Request): Promise<Standing> {
  const known = standings.get(request) ?? readStanding(request)
  standings.set(request, known)
  try {
    return await known
  } catch (problem) {
    console.error(problem)
    throw refusal(request, 503, 'The records cannot be reached just now. Try again in a minute.')
  }
}

function isApi(request: Request): boolean {
  return new URL(request.url).pathname.startsWith('/api/')
}

function refusal(request: Request, status: number, error: string): Response {
  if (isApi(request)) return Response.json({ error, path: '' }, { status })
  return new Response(error, { status, statusText: error })
}

/** Where the person wanted to go, as the address bar shows it. */
function wantedPath(request: Request): string {
  const { pathname, searchParams } = new URL(request.url)
  searchParams.delete('_routes')
  searchParams.delete('index')
  const path = pathname.replace(/\/_?\.data$|\.data$/, '') || '/'
  return searchParams.size > 0 ? `${path}?${searchParams}` : path
}

/**
 * The member who sends the request. Otherwise answers: a page sends the person to sign in and back, the API says 401;
 * an account that belongs to no organisation gets 403; 503 when the records are away.
 */
export async function requireMember(request: Request): Promise<Member> {
  const standing = await standingOf(request)
  if (standing === 'no organisation') throw refusal(request, 403, 'This account belongs to no organisation.')
  if (standing !== 'signed out') return standing
  if (isApi(request)) throw refusal(request, 401, 'Sign in first.')
  const back = request.method === 'GET' ? wantedPath(request) : '/jobs'
  throw redirect(`/sign-in?next=${encodeURIComponent(back)}`)
}

/** The member who sends the request and whose role allows the action; 403 otherwise. */
export async function requireMay(request: Request, action: Action): Promise<Member> {
  const found = await requireMember(request)
  if (!can(found.role, action)) throw refusal(request, 403, 'Your role does not allow this.')
  return found
}
