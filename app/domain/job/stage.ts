/** How far a job has come, in order. */
export const stages = ['enquiry', 'site', 'variants', 'review', 'offer', 'installed'] as const
export type Stage = (typeof stages)[number]

/** The stages before one: a job in one of them moves forward to it, any other stays where it is. */
export const stagesBefore = (stage: Stage): Stage[] => stages.slice(0, stages.indexOf(stage))
