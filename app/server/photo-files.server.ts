import { Resvg } from '@resvg/resvg-js'
import { readPicture, type KeptPicture } from '#app/server/photo-picture.server.ts'
import { files } from '#app/server/outside/storage.server.ts'
import { demoPhotoKey, demoPhotoSvg } from '#drizzle/seed/demo-photo.ts'

/** Under which key the small picture lies beside a whole one. */
export const smallKey = (fileKey: string): string => fileKey.replace(/\.jpg$/, '-small.jpg')

let drawn: Promise<KeptPicture> | undefined

/** The demonstration's photo, drawn once. */
async function drawDemoPhoto(): Promise<KeptPicture> {
  const picture = await readPicture(new Resvg(demoPhotoSvg()).render().asPng())
  if ('wrong' in picture) throw new Error(picture.wrong)
  return picture
}

/** The kept picture of a photo, whole or small; null when its file is gone. */
export async function findPicture(fileKey: string, small: boolean): Promise<Blob | null> {
  if (fileKey !== demoPhotoKey) return files.find(small ? smallKey(fileKey) : fileKey)
  drawn ??= drawDemoPhoto()
  const picture = await drawn
  return new Blob([small ? picture.small : picture.bytes], { type: 'image/jpeg' })
}
