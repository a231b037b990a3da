import type { Action } from '#app/domain/access/roles.ts'

/** Who may use a line of routes.ts: anybody, any member, or members whose role may do what the method needs. */
export type Reach = 'open' | 'any member' | Partial<Record<Method, Action | 'any member'>>

/** The methods that are tried on every line, known to it or not. */
export const methods = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const
export type Method = (typeof methods)[number]

/** Every pattern of routes.ts. A line that is missing here fails the test, and so does one that is too many. */
export const reachOf: Record<string, Reach> = {
  '/': 'any member',
  '/jobs': { GET: 'view' },
  '/jobs/new': { GET: 'create-job', POST: 'create-job' },
  '/jobs/:jobId': { GET: 'view' },
  '/jobs/:jobId/brief': { GET: 'view' },
  '/jobs/:jobId/site': { GET: 'view' },
  '/jobs/:jobId/photos': { GET: 'view' },
  '/jobs/:jobId/photos/:photoId': { GET: 'view' },
  '/jobs/:jobId/variants': { GET: 'view' },
  '/jobs/:jobId/variants/:variantId': { GET: 'view' },
  '/jobs/:jobId/variants/:variantId/sizes': { GET: 'view' },
  '/jobs/:jobId/variants/:variantId/picture.png': { GET: 'export' },
  '/jobs/:jobId/variants/:variantId/picture.svg': { GET: 'export' },
  '/jobs/:jobId/variants/:variantId/hang': { GET: 'view' },
  '/jobs/:jobId/compare': { GET: 'view' },
  '/jobs/:jobId/compare.png': { GET: 'export' },
  '/jobs/:jobId/compare.svg': { GET: 'export' },
  '/heaters': { GET: 'view' },
  '/rules': { GET: 'view' },
  '/rules/house': { GET: 'view', POST: 'edit-rules' },
  '/rules/hanging': { GET: 'view', POST: 'edit-rules' },
  '/rules/sets/new': { GET: 'edit-rules', POST: 'edit-rules' },
  '/rules/sets/:setId': { GET: 'view', POST: 'edit-rules' },
  '/team': { GET: 'any member' },
  '/sign-in': 'open',
  '/sign-out': 'open',
  '/reset-password': 'open',
  '/reset-password/:token': 'open',
  '/outbox': 'open',
  '/healthz': 'open',
  '/readyz': 'open',
  '/api/jobs': { GET: 'view' },
  '/api/jobs/:jobId': { GET: 'view' },
  '/api/jobs/:jobId/site': { GET: 'view', PUT: 'edit-site' },
  '/api/jobs/:jobId/brief': { GET: 'view', PUT: 'edit-brief' },
  '/api/jobs/:jobId/variants': { GET: 'view', POST: 'edit-layout' },
  '/api/jobs/:jobId/photos': { GET: 'view', POST: 'edit-site' },
  '/api/photos/:photoId': { GET: 'view', PUT: 'edit-site', DELETE: 'edit-site' },
  '/api/photos/:photoId/restore': { POST: 'edit-site' },
  '/api/photos/:photoId/picture.jpg': { GET: 'view' },
  '/api/variants/:variantId': { GET: 'view', PUT: 'edit-layout', DELETE: 'edit-layout' },
  '/api/variants/:variantId/restore': { POST: 'edit-layout' },
  '/api/variants/:variantId/revisions': { GET: 'view' },
  '/api/variants/:variantId/thumbnail.svg': { GET: 'view' },
  '/api/variants/:variantId/seats.csv': { GET: 'export' },
  '/api/variants/:variantId/seats/:seatId/explain': { GET: 'view' },
  '/api/heaters': { GET: 'view' },
  '/api/heaters/:code/beam': { GET: 'view', PUT: 'edit-beams', DELETE: 'edit-beams' },
  '/api/heaters/:code/beam.csv': { GET: 'export' },
  '/api/flux': { POST: 'any member' },
  '/api/*': 'any member',
  '/*': 'open',
}
