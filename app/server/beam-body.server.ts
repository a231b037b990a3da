import { z } from 'zod'
import { beamCsv, beamTableOf, type CellFault } from '#app/domain/flux/beam-table.ts'
import { beamTableSchema, type BeamTableData } from '#app/domain/heaters/heater-model.ts'
import { isRefusal, type Refusal } from '#app/server/answers.server.ts'
import { checked, findFault, readBody, readText } from '#app/server/json-body.server.ts'
import { readExpected, readKey } from '#app/server/preconditions.server.ts'
import type { Save } from '#app/server/saving.server.ts'
import { contentHash } from '#drizzle/content-hash.ts'

/** Where a table comes from, in the words of who sends it: needed, and short enough to be shown. */
export const beamSourceSchema = z
  .string()
  .trim()
  .min(1, 'Say where the table comes from, such as the report and its number.')
  .max(200, 'At most 200 characters.')

const sentTableSchema = beamTableSchema.extend({ source: beamSourceSchema })

const inSheet = ({ row, column }: CellFault): string => `row ${row}, column ${column}`

/** The same place in the JSON of a table. */
function inJson({ row, column }: CellFault): string {
  if (row === 1) return `alongDeg.${column - 2}`
  return column === 1 ? `acrossDeg.${row - 2}` : `intensity.${row - 2}.${column - 2}`
}

/** A table that is whole and radiates to the front, or a refusal (400) that names every wrong place. */
function readTable(
  csv: string,
  source: string,
  placeOf: (fault: CellFault) => string,
): { readonly beam: BeamTableData } | Refusal {
  const read = beamTableOf(csv, source)
  if ('beam' in read) return read
  const [first] = read.faults
  const error = first ? `${first.error} (row ${first.row}, column ${first.column} of the table)` : ''
  return { status: 400, error, path: first ? placeOf(first) : 'body', faults: read.faults }
}

async function readCsv(request: Request): Promise<{ readonly beam: BeamTableData } | Refusal> {
  const asked = new URL(request.url).searchParams.get('source') ?? ''
  const source = findFault({ source: asked }) ?? checked(z.object({ source: beamSourceSchema }), { source: asked })
  if (isRefusal(source)) return source
  const text = await readText(request)
  return typeof text === 'string' ? readTable(text, source.value.source, inSheet) : text
}

async function readJsonTable(request: Request): Promise<{ readonly beam: BeamTableData } | Refusal> {
  const sent = await readBody(request, sentTableSchema)
  return isRefusal(sent) ? sent : readTable(beamCsv(sent.value), sent.value.source, inJson)
}

/**
 * Key, If-Match and table of a request, or the first thing wrong with them: CSV when the request says so, with its
 * `source` in the address; else a BeamData table as JSON.
 */
export async function readBeamSave(request: Request): Promise<Save<BeamTableData> | Refusal> {
  const key = readKey(request)
  if (isRefusal(key)) return key
  const expected = readExpected(request)
  if (isRefusal(expected)) return expected
  const isCsv = request.headers.get('Content-Type')?.startsWith('text/csv')
  const read = await (isCsv ? readCsv(request) : readJsonTable(request))
  if (isRefusal(read)) return read
  return { ...key, ...expected, body: read.beam, bodyHash: contentHash([request.method, read.beam]) }
}
