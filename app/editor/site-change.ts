import type { Site } from '#app/domain/site/site.ts'

/** What became of a change of the site: kept; somebody changed it meanwhile, whose copy is shown now; refused; not sent. */
export type SiteSaved =
  | { readonly kind: 'saved' | 'unreachable' }
  | { readonly kind: 'changed elsewhere'; readonly by: string | null }
  | { readonly kind: 'refused'; readonly reason: string }

/** Changes the site of the layout's job and keeps it at once. */
export type ChangeSite = (change: (site: Site) => Site) => Promise<SiteSaved>
