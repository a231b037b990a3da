/** A figure of ours that an article of a rule set may give, with its unit and the greatest that makes sense. */
interface Bearing {
  readonly label: string
  readonly unit: 'm' | 'W/m²' | '×'
  readonly most: number
}

/** What articles bear on. Clearances are to combustible things; 'at least' for lengths, 'at most' for the others. */
export const bearings = {
  'clearance-above': { label: 'Clearance above', unit: 'm', most: 20 },
  'clearance-side': { label: 'Clearance at the side', unit: 'm', most: 20 },
  'clearance-end': { label: 'Clearance beyond the end', unit: 'm', most: 20 },
  'clearance-front-of-beam': { label: 'Clearance in front of the beam', unit: 'm', most: 20 },
  'clearance-below': { label: 'Clearance below', unit: 'm', most: 20 },
  'mounting-height': { label: 'Least mounting height', unit: 'm', most: 20 },
  'sprinkler-distance': { label: 'Distance from a sprinkler', unit: 'm', most: 20 },
  'lamp-distance': { label: 'Distance from a lamp', unit: 'm', most: 20 },
  'head-caution': { label: 'Caution at the head', unit: 'W/m²', most: 5000 },
  'supply-over-rated': { label: 'Supply above rated voltage, at most', unit: '×', most: 2 },
} as const satisfies Record<string, Bearing>

export type BearingName = keyof typeof bearings
