import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'

export type Currency = 'EUR' | 'USD'

/** What the heaters of a layout cost by the list, before tax; models without a list price in that currency by name. */
export interface ListPrice {
  readonly amount: number
  readonly currency: Currency
  readonly unpriced: readonly string[]
}

/** List price of the heaters alone: no mounts, services, freight or tax. */
export function listPriceOf(
  { heaters }: Pick<Layout, 'heaters'>,
  models: ReadonlyMap<string, HeaterModel>,
  currency: Currency,
): ListPrice {
  const prices = heaters.map(({ model }) => ({ model, price: models.get(model)?.listPrice[currency] }))
  const unpriced = prices.filter(({ price }) => price === undefined)
  return {
    amount: Math.round(100 * prices.reduce((sum, { price }) => sum + (price ?? 0), 0)) / 100,
    currency,
    unpriced: [...new Set(unpriced.map(({ model }) => models.get(model)?.name ?? model))],
  }
}

/** "€ 6 015.40" or "$ 7 170": currency first, a gap between thousands, cents only when there are some. */
export function formatMoney(amount: number, currency: Currency, cents = !Number.isInteger(amount)): string {
  const [whole = '0', part] = Math.abs(amount)
    .toFixed(cents ? 2 : 0)
    .split('.')
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, '\u00a0')
  return `${amount < 0 ? '−' : ''}${currency === 'EUR' ? '€' : '$'}\u00a0${grouped}${part ? `.${part}` : ''}`
}
