/**
 * Relative radiant intensity of an element. `cosine`: cos^across α · cos^along β with real exponents, α transverse and
 * β longitudinal. `table`: bilinear over transverse × longitudinal angles in rad, not necessarily symmetric; rows by α.
 */
export type Beam =
  | { readonly kind: 'cosine'; readonly across: number; readonly along: number }
  | {
      readonly kind: 'table'
      readonly across: readonly number[]
      readonly along: readonly number[]
      readonly intensity: readonly (readonly number[])[]
    }
