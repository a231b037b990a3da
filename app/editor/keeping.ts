/** Something as the server keeps it. */
export interface Kept<T> {
  readonly revision: number
  readonly body: T
}

/** One save: the same id and body may be sent again and has one effect. */
export interface SaveRequest<T> extends Kept<T> {
  readonly saveId: string
}

/** What became of a save; of a request the revision is the one it was made from. */
export type SaveAnswer<T> =
  | { readonly kind: 'saved'; readonly revision: number }
  | {
      readonly kind: 'conflict'
      readonly current: Kept<T>
      /** Who saved it, by name, and when. */
      readonly by: string | null
      readonly at: Date | null
    }
  /** The server understood and will not take it; sending it again helps nothing. */
  | { readonly kind: 'refused'; readonly reason: string }
  /** No answer: offline, or the server is away. */
  | { readonly kind: 'unreachable' }

/** Edits that the server has not acknowledged, as the device keeps them over a reload. */
export interface DeviceCopy<T> {
  /** What they were made from. */
  readonly base: Kept<T>
  readonly body: T
  /** How many changes they are. */
  readonly changes: number
}

/** Where something is kept; the page that shows it brings it. */
export interface Keeping<T> {
  save: (request: SaveRequest<T>) => Promise<SaveAnswer<T>>
  newSaveId: () => string
  /** null: nothing is kept there any more. */
  keepOnDevice: (copy: DeviceCopy<T> | null) => void
  findOnDevice: () => Promise<DeviceCopy<T> | null>
}
