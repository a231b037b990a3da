import type { Brief } from '#app/domain/brief/brief.ts'
import { count, figure, orNothing, words, type BriefField } from '#app/domain/brief/brief-field.ts'
import { energyFields } from '#app/domain/brief/energy-fields.ts'
import { supplyFields } from '#app/domain/brief/supply-fields.ts'
import { formatQuantity, type DisplayUnits } from '#app/domain/units.ts'

const targetOf = (brief: Brief, change: Partial<Brief['target']>): Brief => ({
  ...brief,
  target: { ...brief.target, ...change, source: 'this brief' },
})

/** Place, weather and the season. */
export const eveningFields: readonly BriefField[] = [
  words({ name: 'place', label: 'Place' }, 120, { get: (b) => b.place, set: (b, place) => ({ ...b, place }) }, 1),
  words({ name: 'season', label: 'Months and hours' }, 200, {
    get: (b) => b.season,
    set: (b, season) => ({ ...b, season }),
  }),
  figure(
    {
      name: 'airTemperature',
      label: 'Air on the design evening',
      hint: 'The coldest evening that should still be warm',
    },
    'temperature',
    { min: -30, max: 35 },
    { get: (b) => b.airTemperature, set: (b, airTemperature) => ({ ...b, airTemperature }) },
  ),
  orNothing(
    figure(
      { name: 'surroundingsTemperature', label: 'Sky and surroundings', hint: 'Left open: as the air' },
      'temperature',
      { min: -60, max: 60 },
      {
        get: (b) => b.surroundingsTemperature ?? b.airTemperature,
        set: (b, surroundingsTemperature) => ({ ...b, surroundingsTemperature }),
      },
    ),
    (b) => b.surroundingsTemperature,
    (b) => ({ ...b, surroundingsTemperature: null }),
  ),
  count(
    { name: 'relativeHumidity', label: 'Relative humidity' },
    '%',
    { min: 0, max: 100 },
    {
      get: (b) => b.relativeHumidity,
      set: (b, relativeHumidity) => ({ ...b, relativeHumidity }),
    },
  ),
  figure(
    { name: 'windDesign', label: 'Wind at the seats', hint: 'Sheltered 0.3, open side 1, by the water 2 m/s' },
    'speed',
    { min: 0, max: 15 },
    { get: (b) => b.windDesign, set: (b, windDesign) => ({ ...b, windDesign }) },
  ),
  figure(
    { name: 'windGust', label: 'Gusts' },
    'speed',
    { min: 0, max: 20 },
    {
      get: (b) => b.windGust,
      set: (b, windGust) => ({ ...b, windGust }),
    },
  ),
  words({ name: 'windNote', label: 'Sheltered sides' }, 400, {
    get: (b) => b.windNote,
    set: (b, windNote) => ({ ...b, windNote }),
  }),
]

/** Who sits there, how long, in what clothes, and how warm they should be. */
export const guestFields: readonly BriefField[] = [
  count(
    { name: 'clothing', label: 'Clothing', hint: 'Shirt 0.7, jumper 1.0, coat 1.3, winter coat 1.8' },
    'clo',
    { min: 0, max: 4 },
    {
      get: (b) => b.clothing,
      set: (b, clothing) => ({ ...b, clothing }),
    },
  ),
  count(
    { name: 'activity', label: 'Activity', hint: 'Sitting 1.0, dining 1.2, standing 1.6' },
    'met',
    { min: 0.8, max: 4 },
    {
      get: (b) => b.activity,
      set: (b, activity) => ({ ...b, activity }),
    },
  ),
  count(
    { name: 'stayMinutes', label: 'Stay' },
    'min',
    { min: 1, max: 1440 },
    {
      get: (b) => b.stayMinutes,
      set: (b, stayMinutes) => ({ ...b, stayMinutes }),
    },
  ),
  figure(
    { name: 'targetLow', label: 'Target from', hint: 'On the body plane' },
    'irradiance',
    { min: 0, max: 1000 },
    {
      get: (b) => b.target.low,
      set: (b, low) => targetOf(b, { low }),
    },
  ),
  figure(
    { name: 'targetHigh', label: 'Target to' },
    'irradiance',
    { min: 1, max: 1500 },
    {
      get: (b) => b.target.high,
      set: (b, high) => targetOf(b, { high }),
    },
  ),
  words({ name: 'story', label: 'What they want' }, 2000, {
    get: (b) => b.story,
    set: (b, story) => ({ ...b, story }),
  }),
]

/** Every question of the brief. */
export const briefFields: readonly BriefField[] = [...eveningFields, ...guestFields, ...supplyFields, ...energyFields]

/** An assumption in words: what is assumed, and its figure. */
export function assumptionOf(brief: Brief, name: string, units: DisplayUnits): string {
  const field = briefFields.find((each) => each.name === name)
  if (!field) return name
  if (name === 'surroundingsTemperature' && brief.surroundingsTemperature === null)
    return `${field.label}: as the air, ${formatQuantity(brief.airTemperature, 'temperature', units)}`
  const shown =
    field.options?.find(({ value }) => value === field.show(brief, units))?.label ?? field.show(brief, units)
  return `${field.label}: ${shown || 'not known'}${shown && field.unit(units) && !shown.includes(' ') ? ` ${field.unit(units)}` : ''}`
}
