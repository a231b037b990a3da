import sharp from 'sharp'
import { largestSide } from '#app/domain/photo/measurements.ts'
import { oneAtATime } from '#app/server/one-at-a-time.server.ts'

/** A picture as it is kept: JPEG, upright, without anything that the camera wrote beside it. */
export interface KeptPicture {
  readonly bytes: Uint8Array<ArrayBuffer>
  /** The same at most 480 px, for lists. */
  readonly small: Uint8Array<ArrayBuffer>
  readonly width: number
  readonly height: number
}

/** Stated maximum of a picture's pixels: what a decoder may be made to unpack. */
const mostPixels = 40_000_000
const leastSide = 100
const smallSide = 480

const kinds = [
  { format: 'jpeg', starts: [0xff, 0xd8, 0xff], at: 0 },
  { format: 'png', starts: [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a], at: 0 },
  { format: 'webp', starts: [0x57, 0x45, 0x42, 0x50], at: 8 },
] as const

/** What kind of picture the bytes themselves are; null for everything else, whatever its name says. */
const kindOf = (bytes: Uint8Array) =>
  kinds.find(({ starts, at }) => starts.every((byte, k) => bytes[at + k] === byte))?.format ?? null

const queued = oneAtATime(30)
sharp.cache(false)
sharp.concurrency(1)

const copy = (buffer: Buffer): Uint8Array<ArrayBuffer> => new Uint8Array(buffer)

/** The picture in some bytes as it will be kept, or what is wrong with it, in words for the person who gave it. */
export async function readPicture(bytes: Uint8Array): Promise<KeptPicture | { readonly wrong: string }> {
  const kind = kindOf(bytes)
  if (!kind) return { wrong: 'This is no JPEG, PNG or WebP picture. Save it as one of these.' }
  const done = await queued(() => keptPicture(bytes, kind))
  return done ?? { wrong: 'Too many pictures are being read. Send it again in a minute.' }
}

async function keptPicture(bytes: Uint8Array, kind: string): Promise<KeptPicture | { readonly wrong: string }> {
  const options = { limitInputPixels: mostPixels, failOn: 'error', sequentialRead: true } as const
  try {
    const { format, width = 0, height = 0 } = await sharp(bytes, options).metadata()
    if (format !== kind) return { wrong: 'The picture is not what it says it is.' }
    if (width * height > mostPixels) {
      return { wrong: `The picture has more than ${mostPixels / 1e6} million pixels. Make it smaller.` }
    }
    if (Math.min(width, height) < leastSide) return { wrong: `A picture has at least ${leastSide} px on each side.` }
    const made = await sharp(bytes, options)
      .autoOrient()
      .resize(largestSide, largestSide, { fit: 'inside', withoutEnlargement: true })
      .flatten({ background: '#ffffff' })
      .toColourspace('srgb')
      .jpeg({ quality: 86 })
      .toBuffer({ resolveWithObject: true })
    const small = await sharp(made.data)
      .resize(smallSide, smallSide, { fit: 'inside', withoutEnlargement: true })
      .jpeg({ quality: 80 })
      .toBuffer()
    return { bytes: copy(made.data), small: copy(small), width: made.info.width, height: made.info.height }
  } catch {
    return { wrong: `The picture cannot be read: it is damaged, or has more than ${mostPixels / 1e6} million pixels.` }
  }
}
