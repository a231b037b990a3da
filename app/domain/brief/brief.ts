import { z } from 'zod'
import { chosenRuleSetSchema } from '#app/domain/rules/rule-set.ts'

/** What the customer asked for and what the computation needs of it. °C, m/s, clo, met, minutes, V, A. */
export const briefSchema = z.strictObject({
  place: z.string().trim().min(1).max(120),
  story: z.string().max(2000),
  season: z.string().max(200),
  airTemperature: z.number().min(-30).max(35),
  /** Air speed at the seats for the design evening. */
  windDesign: z.number().min(0).max(15),
  windGust: z.number().min(0).max(20),
  windNote: z.string().max(400),
  relativeHumidity: z.number().min(0).max(100),
  /** Mean radiant temperature of the surroundings under open sky; null: taken as the air temperature, an assumption. */
  surroundingsTemperature: z.number().min(-60).max(60).nullable(),
  clothing: z.number().min(0).max(4),
  activity: z.number().min(0.8).max(4),
  stayMinutes: z.number().min(1).max(1440),
  supply: z.strictObject({
    system: z.string().max(200),
    phases: z.union([z.literal(1), z.literal(3)]),
    phaseVoltage: z.number().min(50).max(1000),
    lineVoltage: z.number().min(50).max(1000).nullable(),
    sparePerPhase: z.array(z.number().nonnegative()).max(3),
    /** Board to the heaters, m; null: not known. */
    distance: z.number().nonnegative().nullable(),
    note: z.string().max(400),
  }),
  energy: z
    .strictObject({
      pricePerKwh: z.number().nonnegative(),
      currency: z.enum(['EUR', 'USD']),
      hoursPerEvening: z.number().min(0).max(24),
      dutyFraction: z.number().min(0).max(1),
      eveningsPerYear: z.number().min(0).max(366),
    })
    .nullable(),
  /** Band of horizontal irradiance on the body plane, W/m². */
  target: z.strictObject({ low: z.number().nonnegative(), high: z.number().positive(), source: z.string().max(200) }),
  /** The rule set that holds at the place, as it was when it was chosen; absent: none chosen. */
  ruleSet: chosenRuleSetSchema.optional(),
  /** Fields answered with "don't know": they hold a stated default and stay visible as assumptions. */
  assumed: z.array(z.string().max(60)).max(40),
})
export type Brief = z.infer<typeof briefSchema>
