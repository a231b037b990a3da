import { pergola } from '#app/domain/site/templates/pergola.ts'
import { roofBar } from '#app/domain/site/templates/roof-bar.ts'
import type { SiteTemplate } from '#app/domain/site/templates/template.ts'
import { umbrellaTerrace } from '#app/domain/site/templates/umbrella-terrace.ts'
import { veranda } from '#app/domain/site/templates/veranda.ts'

/** The kinds of places that a site can start from. */
export const siteTemplates: readonly SiteTemplate[] = [veranda, pergola, roofBar, umbrellaTerrace]
