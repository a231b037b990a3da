import { createHash } from 'node:crypto'
import {
  FormDataParseError,
  MaxFileSizeExceededError,
  MaxFilesExceededError,
  parseFormData,
} from '@remix-run/form-data-parser'
import { mostMegabytes } from '#app/domain/photo/photo-limits.ts'
import { isRefusal, type Refusal } from '#app/server/answers.server.ts'
import { readPicture, type KeptPicture } from '#app/server/photo-picture.server.ts'
import { readKey } from '#app/server/preconditions.server.ts'

/** A photo that was sent: its picture as it will be kept, its name, and what tells it from another. */
export interface SentPhoto {
  readonly key: string
  readonly bodyHash: string
  readonly name: string
  readonly picture: KeptPicture
}

const refusal = (status: Refusal['status'], error: string): Refusal => ({ status, error, path: 'photo' })

/** A file's name without its folder and ending, in characters that can be shown and stored. */
function nameOf(fileName: string): string {
  const last = fileName.replace(/^.*[\\/]/, '').replace(/\.[A-Za-z0-9]{1,5}$/, '')
  const plain = last.replace(/[\p{Cc}\p{Cf}\p{Surrogate}]/gu, '').trim()
  return plain.slice(0, 80) || 'Photo'
}

async function readForm(request: Request): Promise<FormData | Refusal> {
  const most = mostMegabytes * 1_000_000
  if (!request.headers.get('Content-Type')?.startsWith('multipart/form-data')) {
    return refusal(400, 'Send one file as the field photo of a multipart form.')
  }
  try {
    return await parseFormData(request, { maxFiles: 1, maxFileSize: most, maxParts: 4, maxTotalSize: most + 100_000 })
  } catch (problem) {
    if (problem instanceof MaxFileSizeExceededError) {
      return refusal(413, `A photo is at most ${mostMegabytes} MB.`)
    }
    if (problem instanceof MaxFilesExceededError) return refusal(400, 'Send one photo at a time.')
    if (problem instanceof FormDataParseError || problem instanceof Error)
      return refusal(400, 'The form cannot be read.')
    throw problem
  }
}

/** The photo of an upload, read from its bytes and drawn anew, or why it is refused. */
export async function readUpload(request: Request): Promise<SentPhoto | Refusal> {
  const key = readKey(request)
  if (isRefusal(key)) return key
  const form = await readForm(request)
  if (!(form instanceof FormData)) return form
  const file = form.get('photo')
  if (!(file instanceof File) || file.size === 0) return refusal(400, 'Choose a photo.')
  const bytes = new Uint8Array(await file.arrayBuffer())
  const name = nameOf(file.name)
  const picture = await readPicture(bytes)
  if ('wrong' in picture) return refusal(422, picture.wrong)
  const bodyHash = createHash('sha256').update(name).update('\0').update(bytes).digest('hex')
  return { ...key, bodyHash, name, picture }
}
