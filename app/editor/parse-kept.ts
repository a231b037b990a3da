import { z } from 'zod'
import { layoutSchema } from '#app/domain/layout/layout.ts'
import type { DeviceCopy } from '#app/editor/keeping.ts'

// Loaded when an answer comes, so that the page does not wait for a parser.

const variantSchema = z.object({ id: z.string(), revision: z.int(), ...layoutSchema.shape })
const refusalSchema = z.object({ error: z.string(), current: z.unknown().optional() })
const keptLayoutSchema = z.object({ layout: layoutSchema, revision: z.int() })
const deviceCopySchema = z.object({ base: keptLayoutSchema, layout: layoutSchema, changes: z.int() })

/** A variant as the API answers it. */
export type KeptVariant = z.infer<typeof variantSchema>

/** The variant in an answer of the API; throws when it is not one. */
export const parseVariant = (json: unknown): KeptVariant => variantSchema.parse(json)

/** Why a save was refused, with the server's copy where it sent one; throws when the answer is something else. */
export const parseRefusal = (json: unknown): z.infer<typeof refusalSchema> => refusalSchema.parse(json)

/** Unsaved edits as the device kept them; throws when they are not whole. */
export const parseDeviceCopy = (text: string): DeviceCopy => deviceCopySchema.parse(JSON.parse(text))
