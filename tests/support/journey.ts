import { expect, type APIRequestContext, type Page } from '@playwright/test'
import { z } from 'zod'
import type { Role } from '#app/domain/access/roles.ts'
import { heaterModelSchema, type HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { mountedHeaterSchema } from '#app/domain/layout/layout.ts'
import { siteSchema } from '#app/domain/site/site.ts'
import { endToEndOrigin } from '#tests/support/end-to-end-origin.ts'

/** Signs in as one of the demonstration's people and lands on the jobs. */
export async function signIn(page: Page, role: Role): Promise<void> {
  await page.goto('/sign-in')
  await page.getByLabel('E-mail').fill(`${role}@inglefield.test`)
  await page.getByLabel('Password').fill('warm-terrace-demo')
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL('**/jobs')
}

/** A job of a test's own, of which nothing is known; lands on its empty site. */
export async function openJob(page: Page, name: string): Promise<void> {
  await page.goto('/jobs/new')
  await page.getByLabel('Job', { exact: true }).fill(name)
  await page.getByLabel('Place', { exact: true }).fill('Somewhere')
  for (const unknown of await page.getByRole('checkbox').all()) await unknown.check()
  await page.getByRole('button', { name: 'Open the job' }).click()
  await page.waitForURL(/\/site$/)
}

/** Violations of the content security policy and errors of the page, as they come. */
export async function watchPage(page: Page): Promise<{ readonly violations: string[]; readonly errors: string[] }> {
  const seen = { violations: [] as string[], errors: [] as string[] }
  await page.exposeFunction('reportViolation', (text: string) => seen.violations.push(text))
  await page.addInitScript(() =>
    document.addEventListener('securitypolicyviolation', (event) =>
      (window as unknown as { reportViolation: (text: string) => void }).reportViolation(
        `${event.violatedDirective} ${event.blockedURI}`,
      ),
    ),
  )
  page.on('pageerror', (error) => seen.errors.push(String(error)))
  return seen
}

const variantSchema = z.object({
  id: z.string(),
  number: z.number(),
  revision: z.number(),
  title: z.string(),
  heaters: z.array(mountedHeaterSchema),
})
export type JourneyVariant = z.infer<typeof variantSchema>

const jobSchema = z.object({ id: z.string(), name: z.string(), site: siteSchema })
export type JourneyJob = z.infer<typeof jobSchema> & { variants: JourneyVariant[] }

/** A demonstration job with its site and variants, through the public API. */
export async function readJob(request: APIRequestContext, name: RegExp): Promise<JourneyJob> {
  const list = z.object({ jobs: z.array(z.object({ id: z.string(), name: z.string() })) })
  const jobs = list.parse(await (await request.get('/api/jobs')).json()).jobs
  const id = jobs.find((job) => name.test(job.name))?.id ?? ''
  const job = jobSchema.parse(await (await request.get(`/api/jobs/${id}`)).json())
  const known = z.object({ variants: z.array(z.object({ id: z.string() })) })
  const ids = known.parse(await (await request.get(`/api/jobs/${id}/variants`)).json()).variants
  const variants = await Promise.all(
    ids.map(async (each) => variantSchema.parse(await (await request.get(`/api/variants/${each.id}`)).json())),
  )
  return { ...job, variants: variants.toSorted((a, b) => a.number - b.number) }
}

export const variantOf = (job: JourneyJob, number: number): JourneyVariant => {
  const found = job.variants.find((variant) => variant.number === number)
  expect(found, `variant ${number}`).toBeDefined()
  return found!
}

export async function readModels(request: APIRequestContext): Promise<ReadonlyMap<string, HeaterModel>> {
  const { heaters } = z
    .object({ heaters: z.array(heaterModelSchema) })
    .parse(await (await request.get('/api/heaters')).json())
  return new Map(heaters.map((model) => [model.code, model]))
}

/** Horizontal irradiance at points from a variant's heaters, asked of POST /api/flux. */
export async function askFlux(
  request: APIRequestContext,
  variant: JourneyVariant,
  points: readonly { x: number; y: number; z: number }[],
): Promise<number[]> {
  const heaters = variant.heaters.map((h) => ({
    model: h.model,
    supplyVoltage: h.supplyVoltage,
    ...(h.ratedVoltage === undefined ? {} : { ratedVoltage: h.ratedVoltage }),
    ...(h.stage === undefined ? {} : { stage: h.stage }),
    at: { x: h.x, y: h.y, z: h.lowestPoint },
    turnDeg: h.turnDeg,
    tiltDeg: h.tiltDeg,
  }))
  const answer = await request.post('/api/flux', {
    headers: { Origin: endToEndOrigin },
    data: { heaters, points: points.map((p) => ({ ...p, normal: [0, 0, 1] })) },
  })
  expect(answer.status()).toBe(200)
  return z.object({ irradiance: z.array(z.number()) }).parse(await answer.json()).irradiance
}
