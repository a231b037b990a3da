/** How a person reads and types figures. SI is stored; switching never changes a stored value. */
export type DisplayUnits = 'metric' | 'imperial'

/** 'rounded': 1 mm or 1/8 in, for drawings and tables. 'fine': 0.1 mm or 1/32 in, for fields that are typed in. */
export type LengthPrecision = 'rounded' | 'fine'

/** International inch and foot, m, exact by the yard and pound agreement of 1959. */
export const inch = 0.0254
export const foot = 0.3048

/** Stored lengths are whole tenths of a millimetre. */
export const roundLength = (metres: number): number => Math.round(metres * 1e4) / 1e4 || 0

/**
 * A length in words: `3.25 m`, `2.479 m`, `11 ft 5 in`, `5 1/2 in`. The error is at most 0.5 mm or 1/16 in rounded,
 * 0.05 mm or 1/64 in fine. A figure that is not finite is "–".
 */
export function formatLength(
  metres: number,
  displayUnits: DisplayUnits,
  precision: LengthPrecision = 'rounded',
): string {
  if (!Number.isFinite(metres)) return '–'
  const text =
    displayUnits === 'metric' ? metricText(Math.abs(metres), precision) : feetText(Math.abs(metres), precision)
  return metres < 0 && /[1-9]/.test(text) ? `−${text}` : text
}

function metricText(metres: number, precision: LengthPrecision): string {
  const digits = metres.toFixed(precision === 'fine' ? 4 : 3)
  return `${digits.replace(/(\.\d\d)(\d*?)0+$/, '$1$2')} m`
}

function feetText(metres: number, precision: LengthPrecision): string {
  const parts = precision === 'fine' ? 32 : 8
  const count = Math.round((metres / inch) * parts)
  const feet = Math.floor(count / (12 * parts))
  const inches = fractionText(count - feet * 12 * parts, parts)
  if (feet === 0) return `${inches} in`
  return `${feet} ft ${inches} in`
}

/** count / parts as a mixed fraction in lowest terms: 17/8 is "2 1/8". */
function fractionText(count: number, parts: number): string {
  const whole = Math.floor(count / parts)
  let numerator = count % parts
  let denominator = parts
  if (numerator === 0) return `${whole}`
  while (numerator % 2 === 0) {
    numerator /= 2
    denominator /= 2
  }
  return whole === 0 ? `${numerator}/${denominator}` : `${whole} ${numerator}/${denominator}`
}

interface Unit {
  readonly symbol: string
  /** Other spellings that are read, in lower case. */
  readonly spelled: readonly string[]
  readonly digits: number
  readonly fromSi: (si: number) => number
  readonly toSi: (value: number) => number
}

const unit = (symbol: string, size: number, digits: number, spelled: readonly string[] = []): Unit => ({
  symbol,
  spelled,
  digits,
  fromSi: (si) => si / size,
  toSi: (value) => value * size,
})

/** NIST SP 811: foot, pound (0.45359237 kg), mile per hour and pound-force exact by definition. */
const quantities = {
  temperature: {
    metric: unit('°C', 1, 1, ['c', 'celsius', '°']),
    imperial: {
      ...unit('°F', 1, 1, ['f', 'fahrenheit', '°']),
      fromSi: (celsius: number) => celsius * 1.8 + 32,
      toSi: (fahrenheit: number) => (fahrenheit - 32) / 1.8,
    },
  },
  'temperature difference': { metric: unit('K', 1, 1, ['°c', 'c']), imperial: unit('°F', 1 / 1.8, 1, ['f']) },
  irradiance: {
    metric: unit('W/m²', 1, 0, ['w/m2', 'w/m^2']),
    imperial: unit('W/ft²', 1 / (foot * foot), 1, ['w/ft2', 'w/ft^2', 'w/sq ft']),
  },
  area: { metric: unit('m²', 1, 1, ['m2']), imperial: unit('ft²', foot * foot, 0, ['ft2', 'sq ft']) },
  speed: { metric: unit('m/s', 1, 1, ['mps']), imperial: unit('mph', 0.44704, 1, ['mi/h']) },
  mass: { metric: unit('kg', 1, 1), imperial: unit('lb', 0.45359237, 1, ['lbs']) },
  force: { metric: unit('N', 1, 0), imperial: unit('lbf', 4.4482216152605, 0, ['lb']) },
  slope: {
    metric: unit('°', Math.PI / 180, 1, ['deg', 'degrees']),
    imperial: {
      ...unit('in/ft', 1, 2, ['in per ft', '"/ft']),
      fromSi: (angle: number) => 12 * Math.tan(angle),
      toSi: (rise: number) => Math.atan(rise / 12),
    },
  },
} as const satisfies Record<string, Record<DisplayUnits, Unit>>

/** Quantities other than length; SI side: °C, K, W/m², m², m/s, kg, N, and rad for a slope. */
export type Quantity = keyof typeof quantities

/** A figure of the domain in the person's unit. */
export const fromSi = (si: number, quantity: Quantity, units: DisplayUnits): number =>
  quantities[quantity][units].fromSi(si)

/** A figure in the person's unit as the domain keeps it. */
export const toSi = (value: number, quantity: Quantity, units: DisplayUnits): number =>
  quantities[quantity][units].toSi(value)

/** The unit as it is written: "W/ft²". */
export const unitSymbol = (quantity: Quantity, units: DisplayUnits): string => quantities[quantity][units].symbol

/** A figure with its unit: "8.0 °C", "28.3 W/ft²"; "–" when not finite. */
export function formatQuantity(
  si: number,
  quantity: Quantity,
  units: DisplayUnits,
  digits = quantities[quantity][units].digits,
): string {
  const { symbol, fromSi: inUnit } = quantities[quantity][units]
  if (!Number.isFinite(si)) return '–'
  const text = Math.abs(inUnit(si)).toFixed(digits)
  return `${inUnit(si) < 0 && /[1-9]/.test(text) ? '−' : ''}${text}${symbol === '°' ? '' : ' '}${symbol}`
}

/** Reads `8`, `46 °F`, `1,6 m/s`: a number in the person's unit or in either unit when it is named. SI out. */
export function parseQuantity(
  text: string,
  quantity: Quantity,
  units: DisplayUnits,
  range: { readonly min: number; readonly max: number },
): { readonly value: number } | { readonly error: string } {
  const own = quantities[quantity][units]
  const match = /^([+-]?(?:\d+(?:[.,]\d*)?|[.,]\d+)) ?(.*)$/.exec(text.replace(/[−–]/g, '-').trim())
  const named = (match?.[2] ?? '').toLowerCase().replace(/º/g, '°')
  const unitNamed = [own, quantities[quantity].metric, quantities[quantity].imperial].find(
    (each: Unit) => named === '' || named === each.symbol.toLowerCase() || each.spelled.includes(named),
  )
  const [least, most] = [range.min, range.max].map((limit) => formatQuantity(limit, quantity, units))
  if (!match || !unitNamed) {
    return { error: `Give a number in ${own.symbol}, between ${least} and ${most}.` }
  }
  const value = unitNamed.toSi(Number((match[1] ?? '').replace(',', '.')))
  return value >= range.min && value <= range.max ? { value } : { error: `Between ${least} and ${most}.` }
}
