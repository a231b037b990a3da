import type { Brief } from '#app/domain/brief/brief.ts'
import { count, noUnit, orNothing, type BriefField } from '#app/domain/brief/brief-field.ts'

type Energy = NonNullable<Brief['energy']>
const firstEnergy: Energy = {
  pricePerKwh: 0,
  currency: 'EUR',
  hoursPerEvening: 4,
  dutyFraction: 1,
  eveningsPerYear: 80,
}
const energyOf = (brief: Brief, change: Partial<Energy>): Brief => ({
  ...brief,
  energy: { ...(brief.energy ?? firstEnergy), ...change },
})

/** What an evening costs; without a price nothing is said about it. */
export const energyFields: readonly BriefField[] = [
  orNothing(
    count(
      { name: 'pricePerKwh', label: 'Price of electricity', hint: 'Left open: no cost is shown' },
      'per kWh',
      { min: 0, max: 10 },
      {
        get: (b) => b.energy?.pricePerKwh ?? 0,
        set: (b, pricePerKwh) => energyOf(b, { pricePerKwh }),
      },
    ),
    (b) => b.energy?.pricePerKwh ?? null,
    (b) => ({ ...b, energy: null }),
  ),
  {
    name: 'currency',
    label: 'Currency',
    unit: noUnit,
    options: [
      { value: 'EUR', label: '€' },
      { value: 'USD', label: '$' },
    ],
    show: (b) => b.energy?.currency ?? 'EUR',
    write: (brief, text) => {
      if (text !== 'EUR' && text !== 'USD') return { error: 'Choose a currency.' }
      return { brief: brief.energy ? energyOf(brief, { currency: text }) : brief }
    },
  },
  count(
    { name: 'hoursPerEvening', label: 'Hours in an evening' },
    'h',
    { min: 0, max: 24 },
    {
      get: (b) => b.energy?.hoursPerEvening ?? firstEnergy.hoursPerEvening,
      set: (b, hoursPerEvening) => (b.energy ? energyOf(b, { hoursPerEvening }) : b),
    },
  ),
  count(
    { name: 'duty', label: 'Share of the time on' },
    '%',
    { min: 0, max: 100 },
    {
      get: (b) => 100 * (b.energy?.dutyFraction ?? firstEnergy.dutyFraction),
      set: (b, percent) => (b.energy ? energyOf(b, { dutyFraction: percent / 100 }) : b),
    },
  ),
  count(
    { name: 'eveningsPerYear', label: 'Evenings in a year' },
    '',
    { min: 0, max: 366 },
    {
      get: (b) => b.energy?.eveningsPerYear ?? firstEnergy.eveningsPerYear,
      set: (b, eveningsPerYear) => (b.energy ? energyOf(b, { eveningsPerYear }) : b),
    },
  ),
]
