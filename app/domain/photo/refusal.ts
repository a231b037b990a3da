/** Why something cannot be measured in a photo. */
export type RefusalReason =
  | 'not finite'
  | 'no size'
  | 'corners together'
  | 'corners in line'
  | 'crossed'
  | 'corner inside'
  | 'beyond horizon'
  | 'other plane'
  | 'no plane'
  | 'marks together'
  | 'no upright'
  | 'uprights in line'
  | 'along view'
  | 'not plumb'
  | 'too rough'

/** Nothing is measured: the reason by name, and in words for the person who marks. */
export interface Refusal {
  readonly refused: RefusalReason
  readonly words: string
}

export const refuse = (refused: RefusalReason, words: string): Refusal => ({ refused, words })

/** Whether an answer is a refusal. */
export const isRefused = (answer: unknown): answer is Refusal =>
  typeof answer === 'object' && answer !== null && 'refused' in answer
