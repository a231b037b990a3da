import { createContext, useContext } from 'react'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'

/** The site that is edited and the one way to change it: every change is a step that can be undone. */
export interface SiteEditing {
  readonly site: Site
  /** Of the house: what a size is worth by where it comes from. */
  readonly rules: HouseRules
  readonly readOnly: boolean
  readonly change: (edit: (site: Site) => Site) => void
}

const EditingContext = createContext<SiteEditing | null>(null)

/** Gives the fields below it the site to edit. */
export const SiteEditingProvider = EditingContext.Provider

/** The site that is edited here. Throws outside a provider. */
export function useSiteEditing(): SiteEditing {
  const editing = useContext(EditingContext)
  if (!editing) throw new Error('A field of the site stands outside the site editor.')
  return editing
}
