import type { Brief } from '#app/domain/brief/brief.ts'
import { assumptionOf } from '#app/domain/brief/brief-fields.ts'
import { assumedInWords } from '#app/domain/site/size-source.ts'
import type { Site } from '#app/domain/site/site.ts'

/** What nobody has confirmed yet, of the evening and of the site, as short phrases: they stand on every output. */
export const assumptionsOf = (brief: Brief, site: Pick<Site, 'dimensions' | 'displayUnits'>): string[] => [
  ...brief.assumed.map((name) => assumptionOf(brief, name, site.displayUnits)),
  ...assumedInWords(site, site.displayUnits),
]
