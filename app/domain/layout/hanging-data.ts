import { z } from 'zod'

const most = 1

/**
 * How hangers are made, as an organisation keeps it. Lengths m. Defaults: the hanging data of the demonstration
 * catalogue; where it has none, common practice without a source.
 */
export const hangingDataSchema = z.strictObject({
  /** Length of one link of chain, inside to inside. */
  linkPitch: z.number().min(0.005).max(0.2),
  /** Clamp, screw links and turnbuckle at rest, of each hanger. */
  hardwareAllowance: z.number().min(0).max(most),
  /** How much a turnbuckle shortens and lengthens, both counted from rest. */
  shortens: z.number().min(0).max(0.5),
  lengthens: z.number().min(0).max(0.5),
  /** Rods are cut to the nearest whole multiple of this. */
  rodStep: z.number().min(0.001).max(0.1),
  /** A secondary safety line is longer than its hanger by this, so that it stays slack. */
  safetySlack: z.number().min(0).max(most),
  /** Chain is ordered in whole lengths of this, rounded up per order. */
  orderStep: z.number().min(0.1).max(50),
})
export type HangingData = z.infer<typeof hangingDataSchema>

/** Where each of the defaults comes from. */
export const hangingSources: Readonly<Record<keyof HangingData, string>> = {
  linkPitch: 'hanging data of the demonstration catalogue',
  hardwareAllowance: 'hanging data of the demonstration catalogue',
  shortens: 'hanging data of the demonstration catalogue',
  lengthens: 'hanging data of the demonstration catalogue',
  rodStep: 'common practice, no source',
  safetySlack: 'common practice, no source',
  orderStep: 'hanging data of the demonstration catalogue',
}
