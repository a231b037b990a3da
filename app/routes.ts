import { index, type RouteConfig, route } from '@react-router/dev/routes'

/** Every URL of the product, one line each. */
export default [
  index('routes/jobs/home.ts'),
  route('jobs', 'routes/jobs/list.tsx'),
  route('jobs/new', 'routes/jobs/new.tsx'),
  route('jobs/:jobId/brief', 'routes/job/brief.tsx'),
  route('sign-in', 'routes/account/sign-in.tsx'),
  route('sign-out', 'routes/account/sign-out.ts'),
  route('reset-password', 'routes/account/reset-password.tsx'),
  route('reset-password/:token', 'routes/account/new-password.tsx'),
  route('outbox', 'routes/account/outbox.tsx'),
  route('healthz', 'routes/healthz.ts'),
  route('readyz', 'routes/readyz.ts'),
  route('api/jobs', 'routes/api/jobs.ts'),
  route('api/jobs/:jobId', 'routes/api/job.ts'),
  route('api/jobs/:jobId/site', 'routes/api/job-site.ts'),
  route('api/jobs/:jobId/brief', 'routes/api/job-brief.ts'),
  route('api/jobs/:jobId/variants', 'routes/api/job-variants.ts'),
  route('api/variants/:variantId', 'routes/api/variant.ts'),
  route('api/variants/:variantId/restore', 'routes/api/variant-restore.ts'),
  route('api/variants/:variantId/revisions', 'routes/api/variant-revisions.ts'),
  route('api/variants/:variantId/seats.csv', 'routes/api/seats-csv.ts'),
  route('api/variants/:variantId/seats/:seatId/explain', 'routes/api/seat-explanation.ts'),
  route('api/heaters', 'routes/api/heaters.ts'),
  route('api/*', 'routes/api/not-found.ts'),
  route('*', 'routes/not-found.tsx'),
] satisfies RouteConfig
