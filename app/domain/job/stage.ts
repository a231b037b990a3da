import { z } from 'zod'

/** How far a job has come, in order. */
export const stages = ['enquiry', 'site', 'variants', 'review', 'offer', 'installed'] as const
export const stageSchema = z.enum(stages)
export type Stage = z.infer<typeof stageSchema>
