/** The seven-point scale of thermal sensation of ISO 7730, from −3 to +3. */
const sensationWords = ['cold', 'cool', 'slightly cool', 'neutral', 'slightly warm', 'warm', 'hot'] as const
export type SensationWord = (typeof sensationWords)[number]

/** How a guest would rate it: always a word; the predicted mean vote only inside the standard's range. */
export interface Sensation {
  readonly word: SensationWord
  /** Predicted mean vote, −3 … +3; null outside the range of ISO 7730. */
  readonly vote: number | null
  /** Predicted share of dissatisfied, 0 … 1; null outside the range. */
  readonly dissatisfied: number | null
}

/** What the vote needs: °C, m/s, relative humidity in %, met, clo. */
export interface VoteInput {
  readonly airTemperature: number
  readonly radiantTemperature: number
  readonly airSpeed: number
  readonly relativeHumidity: number
  readonly activity: number
  readonly clothing: number
}

const kelvin = 273
const metabolicUnit = 58.15

/**
 * Predicted mean vote, ISO 7730 Annex D: heat balance of a clothed body without external work. Meaningful from 10 to
 * 30 °C, below 1 m/s; outside it only its order is used. The clothing's surface temperature is found by halving the
 * step, as in the annex.
 */
export function predictedMeanVote(input: VoteInput): number {
  const { airTemperature, radiantTemperature, airSpeed } = input
  const vapour = input.relativeHumidity * 10 * Math.exp(16.6536 - 4030.183 / (airTemperature + 235))
  const resistance = 0.155 * input.clothing
  const metabolic = input.activity * metabolicUnit
  const enlarged = resistance <= 0.078 ? 1 + 1.29 * resistance : 1.05 + 0.645 * resistance
  const forced = 12.1 * Math.sqrt(airSpeed)
  const skin = 35.7 - 0.028 * metabolic
  const radiantLoss = (surface: number) =>
    3.96e-8 * enlarged * ((surface + kelvin) ** 4 - (radiantTemperature + kelvin) ** 4)
  const convectiveLoss = (surface: number) => {
    const natural = 2.38 * Math.abs(surface - airTemperature) ** 0.25
    return enlarged * Math.max(forced, natural) * (surface - airTemperature)
  }
  const surface = surfaceTemperature(skin, (t) => skin - resistance * (radiantLoss(t) + convectiveLoss(t)))
  const evaporation = 3.05e-3 * (5733 - 6.99 * metabolic - vapour)
  const sweat = Math.max(0, 0.42 * (metabolic - metabolicUnit))
  const breath = 1.7e-5 * metabolic * (5867 - vapour) + 0.0014 * metabolic * (34 - airTemperature)
  const load = metabolic - evaporation - sweat - breath - radiantLoss(surface) - convectiveLoss(surface)
  return (0.303 * Math.exp(-0.036 * metabolic) + 0.028) * load
}

/** Root of t = balance(t), which falls with t: regula falsi after Illinois to 1e-6 K, between bounds that hold it. */
function surfaceTemperature(skin: number, balance: (surface: number) => number): number {
  const excess = (surface: number) => balance(surface) - surface
  let [low, high] = [-100, skin + 100]
  let [above, below] = [excess(low), excess(high)]
  for (let turn = 0, side = 0; turn < 100; turn++) {
    const middle = (low * below - high * above) / (below - above)
    const now = excess(middle)
    if (Math.abs(now) < 1e-6) return middle
    if (now > 0) {
      ;[low, above] = [middle, now]
      if (side === 1) below /= 2
      side = 1
    } else {
      ;[high, below] = [middle, now]
      if (side === -1) above /= 2
      side = -1
    }
  }
  return (low + high) / 2
}

/** Predicted share of dissatisfied, 0.05 … 1, from the vote (ISO 7730, equation 5). */
export const predictedDissatisfied = (vote: number): number =>
  1 - 0.95 * Math.exp(-0.03353 * vote ** 4 - 0.2179 * vote ** 2)

/** The word of the seven-point scale nearest to the vote; beyond its ends, "cold" and "hot". */
export function sensationWord(vote: number): SensationWord {
  const nearest = Math.min(3, Math.max(-3, Math.round(vote)))
  return sensationWords[nearest + 3] ?? 'neutral'
}

/** Air speed that ISO 7730 takes for still air, m/s. */
const stillAir = 0.1

/** What a person brings to the vote: % of humidity in the air, met, clo. */
interface Person {
  readonly relativeHumidity: number
  readonly activity: number
  readonly clothing: number
}

/** The vote of a guest for whom it feels like `feelsLike` °C, in the standard's range or not. */
export const predictedVote = (feelsLike: number, { relativeHumidity, activity, clothing }: Person): number =>
  predictedMeanVote({
    airTemperature: feelsLike,
    radiantTemperature: feelsLike,
    airSpeed: stillAir,
    relativeHumidity,
    activity,
    clothing,
  })

/**
 * Sensation of a guest for whom it feels like `feelsLike` °C: the vote of still air and surroundings at that
 * temperature. ISO 7730 covers 10 to 30 °C below 1 m/s of wind, 0.8 to 4 met and at most 2 clo, votes from −2 to 2
 * (the last three from memory): outside it the word stands alone.
 */
export function sensationOf(feelsLike: number, wind: number, person: Person): Sensation {
  const vote = predictedVote(feelsLike, person)
  const word = sensationWord(vote)
  const inRange =
    feelsLike >= 10 &&
    feelsLike <= 30 &&
    wind < 1 &&
    person.activity >= 0.8 &&
    person.activity <= 4 &&
    person.clothing <= 2 &&
    Math.abs(vote) <= 2
  return inRange ? { word, vote, dissatisfied: predictedDissatisfied(vote) } : { word, vote: null, dissatisfied: null }
}
