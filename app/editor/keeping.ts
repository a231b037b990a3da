import type { Layout } from '#app/domain/layout/layout.ts'

/** A layout as the server keeps it. */
export interface KeptLayout {
  readonly layout: Layout
  readonly revision: number
}

/** One save: the same id and layout may be sent again and has one effect. */
export interface SaveRequest {
  readonly saveId: string
  readonly layout: Layout
  /** The revision it was made from. */
  readonly revision: number
}

/** What became of a save. */
export type SaveAnswer =
  | { readonly kind: 'saved'; readonly revision: number }
  | { readonly kind: 'conflict'; readonly current: KeptLayout; readonly by: string | null; readonly at: string | null }
  /** The server understood and will not take it; sending it again helps nothing. */
  | { readonly kind: 'refused'; readonly reason: string }
  /** No answer: offline, or the server is away. */
  | { readonly kind: 'unreachable' }

/** Edits that the server has not acknowledged, as the device keeps them over a reload. */
export interface DeviceCopy {
  /** What they were made from. */
  readonly base: KeptLayout
  readonly layout: Layout
  /** How many changes they are. */
  readonly changes: number
}

/** Where layouts are kept; the page that shows the editor brings it. */
export interface Keeping {
  save: (request: SaveRequest) => Promise<SaveAnswer>
  newSaveId: () => string
  /** null: nothing is kept there any more. */
  keepOnDevice: (copy: DeviceCopy | null) => void
  findOnDevice: () => Promise<DeviceCopy | null>
}
