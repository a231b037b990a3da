import { and, eq } from 'drizzle-orm'
import { z } from 'zod'
import { briefSchema, type Brief } from '#app/domain/brief/brief.ts'
import { chosenVariants } from '#app/domain/comparison/chosen-variants.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { mountedHeaterSchema, type MountedHeater } from '#app/domain/layout/layout.ts'
import type { House } from '#app/domain/rules/house.ts'
import { siteSchema, type Site } from '#app/domain/site/site.ts'
import { houseColumn, houseOf } from '#app/server/data/house.server.ts'
import { modelsByCode } from '#app/server/data/heaters.server.ts'
import type { OpenJob } from '#app/server/data/jobs.server.ts'
import { variantList } from '#app/server/data/variants.server.ts'
import { asOrganisation, own } from '#app/server/organisation.server.ts'
import { briefs, sites } from '#drizzle/schema.ts'

/** A variant as it is compared. */
export interface ComparedLayout {
  readonly id: string
  readonly number: number
  readonly title: string
  readonly revision: number
  readonly heaters: MountedHeater[]
}

/** The chosen variants of a job with everything that they share, all of one moment. */
export interface Compared {
  readonly site: Site
  readonly brief: Brief
  /** The models that the chosen variants use. */
  readonly models: HeaterModel[]
  readonly house: House
  /** None when the job has fewer than two variants. */
  readonly chosen: ComparedLayout[]
  /** Every variant of the job. */
  readonly all: readonly { readonly number: number; readonly title: string }[]
}

const heatersSchema = z.array(mountedHeaterSchema)
const listSchema = z.array(
  z.object({ id: z.string(), number: z.number(), title: z.string(), revision: z.number(), heaters: z.unknown() }),
)

/** The variants that an address asks to compare, `1,3`, with site, brief, catalogue and house. */
export function findCompared(job: OpenJob, asked: string | null): Promise<Compared> {
  return asOrganisation(job.member.organisationId, async (tx) => {
    const [place] = await tx
      .select({
        site: sites.body,
        brief: briefs.body,
        house: houseColumn(tx),
        variants: variantList(tx, sites.jobId, ['id', 'number', 'title', 'revision', 'heaters']),
      })
      .from(sites)
      .innerJoin(briefs, and(own(briefs), eq(briefs.jobId, sites.jobId)))
      .where(and(own(sites), eq(sites.jobId, job.id)))
    if (!place) throw new Error(`Job ${job.id} has no site or no brief.`)
    const all = listSchema.parse(place.variants)
    const numbers = chosenVariants(
      asked,
      all.map(({ number }) => number),
    )
    const chosen = numbers.flatMap((number) =>
      all
        .filter((variant) => variant.number === number)
        .map((variant) => ({ ...variant, heaters: heatersSchema.parse(variant.heaters) })),
    )
    const used = new Set(chosen.flatMap(({ heaters }) => heaters.map(({ model }) => model)))
    const models = chosen.length === 0 ? [] : [...(await modelsByCode(tx)).values()]
    return {
      site: siteSchema.parse(place.site),
      brief: briefSchema.parse(place.brief),
      models: models.filter(({ code }) => used.has(code)),
      house: houseOf(place.house),
      chosen,
      all: all.map(({ number, title }) => ({ number, title })),
    }
  })
}
