import { z } from 'zod'
import { layoutSchema, type Layout } from '#app/domain/layout/layout.ts'
import { siteSchema, type Site } from '#app/domain/site/site.ts'
import type { DeviceCopy, Kept } from '#app/editor/keeping.ts'

// The variant page loads this when an answer comes, so that it does not wait for a parser.

const refusalSchema = z.object({
  error: z.string(),
  current: z.unknown().optional(),
  changed: z.object({ by: z.string().nullable(), at: z.coerce.date() }).optional(),
})

/** Reads what the server and the device give; every function throws when it is something else. */
export interface KeptParsing<T> {
  /** What is kept, in an answer of the API. */
  readonly kept: (json: unknown) => Kept<T>
  /** Why a save was refused, with the server's copy where it sent one. */
  readonly refusal: (json: unknown) => z.infer<typeof refusalSchema>
  /** Unsaved edits as the device kept them. */
  readonly deviceCopy: (text: string) => DeviceCopy<T>
}

function parsingOf<T>(kept: z.ZodType<Kept<T>>, body: z.ZodType<T>): KeptParsing<T> {
  const copy = z.object({ base: z.object({ revision: z.int(), body }), body, changes: z.int() })
  return {
    kept: (json) => kept.parse(json),
    refusal: (json) => refusalSchema.parse(json),
    deviceCopy: (text) => copy.parse(JSON.parse(text)),
  }
}

/** Of a variant: `{ id, revision, title, heaters }`. */
export const variantParsing: KeptParsing<Layout> = parsingOf(
  z
    .object({ revision: z.int(), ...layoutSchema.shape })
    .transform(({ revision, title, heaters }) => ({ revision, body: { title, heaters } })),
  layoutSchema,
)

/** The id in the answer to a new variant. */
export const variantId = (json: unknown): string => z.object({ id: z.string() }).parse(json).id

/** Of a document whose answers carry its body under a name: `{ revision, [name]: body }`. */
export const documentParsing = <T>(name: string, body: z.ZodType<T>): KeptParsing<T> =>
  parsingOf(
    z
      .looseObject({ revision: z.int() })
      .transform((found) => ({ revision: found.revision, body: body.parse(found[name]) })),
    body,
  )

/** Of a job's site: `{ revision, site }`. */
export const siteParsing: KeptParsing<Site> = documentParsing('site', siteSchema)
