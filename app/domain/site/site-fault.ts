/** Something of a site that cannot be: where it stands in the site, and what is wrong with the limit. */
export interface SiteFault {
  readonly path: readonly (string | number)[]
  readonly message: string
}
