import { readFileSync } from 'node:fs'
import { dirname, join, normalize } from 'node:path'
import ts from 'typescript'

/** A source file of the house by its path from the project's root, with its text. */
export interface SourceFile {
  readonly path: string
  readonly text: string
}

interface Import {
  readonly target: string
  readonly typeOnly: boolean
}

interface Room {
  readonly name: string
  readonly holds: RegExp
  readonly mayImport: readonly RegExp[]
  readonly packages: readonly RegExp[]
}

const any = [/.*/]
const domain = /^app\/domain\//
const drawing = /^app\/drawing\//

/** What may import what: the table of DEVELOPERS.md, first match wins. */
const rooms: readonly Room[] = [
  { name: 'domain', holds: domain, mayImport: [domain], packages: [/^zod$/] },
  { name: 'components', holds: /^app\/components\//, mayImport: [/^app\/components\//], packages: any },
  { name: 'drawing', holds: drawing, mayImport: [domain, drawing], packages: [/^react$/, /^d3-/] },
  {
    name: 'editor',
    holds: /^app\/editor\//,
    mayImport: [domain, drawing, /^app\/(components|editor)\//],
    packages: any,
  },
  { name: 'drizzle', holds: /^drizzle\//, mayImport: [domain, /^drizzle\//], packages: any },
  {
    name: 'server',
    holds: /^app\/server\//,
    mayImport: [domain, drawing, /^app\/server\//, /^drizzle\//],
    packages: any,
  },
  {
    name: 'routes, root and entries',
    holds: /^app\//,
    mayImport: [
      /^app\/(domain|drawing|editor|components|server)\//,
      /^app\/(app\.css|parse-without-eval\.ts)$/,
      /^app\/\+types\//,
    ],
    packages: any,
  },
  {
    name: 'browser workers',
    holds: /^workers\/[^/]+\.worker\.ts$/,
    mayImport: [domain, /^app\/drawing\/heat\//],
    packages: [/^comlink$/, /^d3-contour$/],
  },
  {
    name: 'flux thread',
    holds: /^workers\/flux-thread\.ts$/,
    mayImport: [domain, /^app\/drawing\/heat\//],
    packages: [/^node:worker_threads$/, /^d3-contour$/],
  },
  { name: 'background jobs', holds: /^workers\/jobs\.ts$/, mayImport: [/^app\/server\//], packages: any },
  {
    name: 'start',
    holds: /^workers\/start(-[a-z]+)?\.ts$/,
    mayImport: [/^drizzle\//, /^app\/server\//, /^workers\/start-[a-z]+\.ts$/],
    packages: any,
  },
]

const roomOf = (path: string) => rooms.find((room) => room.holds.test(path))

function isTypeOnly(text: string, specifier: string): boolean {
  const source = ts.createSourceFile('x.tsx', text, ts.ScriptTarget.Latest, false, ts.ScriptKind.TSX)
  const naming = source.statements.filter(
    (s): s is ts.ImportDeclaration | ts.ExportDeclaration =>
      (ts.isImportDeclaration(s) || ts.isExportDeclaration(s)) &&
      s.moduleSpecifier !== undefined &&
      ts.isStringLiteral(s.moduleSpecifier) &&
      s.moduleSpecifier.text === specifier,
  )
  return (
    naming.length > 0 &&
    naming.every((s) => (ts.isImportDeclaration(s) ? s.importClause?.isTypeOnly === true : s.isTypeOnly))
  )
}

function importsOf({ path, text }: SourceFile): Import[] {
  return ts.preProcessFile(text, true, true).importedFiles.map(({ fileName }) => {
    const target = fileName.startsWith('#')
      ? fileName.slice(1)
      : fileName.startsWith('.')
        ? normalize(join(dirname(path), fileName))
        : fileName
    return { target, typeOnly: isTypeOnly(text, fileName) }
  })
}

const isLocal = (target: string) => /^(app|drizzle|workers|tests|public)\//.test(target)
const isGenerated = (target: string) => /(^|\/)\+types\//.test(target)

function brokenArrow(from: string, room: Room, { target, typeOnly }: Import): string | null {
  if (isGenerated(target)) return null
  if (room.name === 'editor' && target.startsWith('workers/') && typeOnly) return null
  if (!isLocal(target))
    return room.packages.some((p) => p.test(target)) ? null : `${from}: ${room.name} may not use ${target}`
  if (room.name === 'routes, root and entries' && /^app\/(routes\/|root|entry)/.test(target))
    return `${from}: nobody imports a route (${target})`
  return room.mayImport.some((p) => p.test(target)) ? null : `${from}: ${room.name} may not import ${target}`
}

/** Every arrow between rooms that the table does not allow, in words. */
export function listBrokenArrows(files: readonly SourceFile[]): string[] {
  return files.flatMap((file) => {
    const room = roomOf(file.path)
    if (!room) return [`${file.path}: belongs to no room`]
    return importsOf(file).flatMap((i) => brokenArrow(file.path, room, i) ?? [])
  })
}

/** Every circle of imports, type imports included, as the path walked. */
export function listCircles(files: readonly SourceFile[]): string[] {
  const graph = new Map(files.map((file) => [file.path, importsOf(file).map((i) => i.target)]))
  const done = new Set<string>()
  const circles: string[] = []
  const walk = (path: string, trail: readonly string[]): void => {
    if (trail.includes(path)) circles.push([...trail.slice(trail.indexOf(path)), path].join(' → '))
    if (trail.includes(path) || done.has(path)) return
    for (const target of graph.get(path) ?? []) if (graph.has(target)) walk(target, [...trail, path])
    done.add(path)
  }
  for (const path of graph.keys()) walk(path, [])
  return circles
}

const sayNothing =
  /(^|\/)(utils?|helpers?|lib|misc|common|types|constants|managers?|services?|index|legacy|.*-(v2|new|old))(\/|\.[a-z.]+$)/

/** File names against the style of the house. */
export function listBadNames(paths: readonly string[]): string[] {
  return paths.flatMap((path) => {
    const problems: string[] = []
    if (sayNothing.test(path)) problems.push(`${path}: the name says nothing`)
    if (!/^[a-z0-9./-]+$/.test(path)) problems.push(`${path}: kebab-case`)
    if (path.startsWith('app/server/') && !/\.server\.tsx?$/.test(path)) problems.push(`${path}: lacks .server`)
    if (!path.startsWith('app/server/') && /\.server\./.test(path) && path !== 'app/entry.server.tsx')
      problems.push(`${path}: .server outside app/server`)
    return problems
  })
}

const doors = new Set(['loader', 'action', 'clientAction'])

function firstStatement(statement: ts.Statement, source: ts.SourceFile): [name: string, first: string][] {
  if (ts.isFunctionDeclaration(statement) && statement.name && doors.has(statement.name.text))
    return [[statement.name.text, statement.body?.statements[0]?.getText(source) ?? '']]
  if (!ts.isVariableStatement(statement)) return []
  return statement.declarationList.declarations.flatMap((d): [string, string][] =>
    ts.isIdentifier(d.name) && doors.has(d.name.text) ? [[d.name.text, d.initializer?.getText(source) ?? '']] : [],
  )
}

/** Loaders and actions of routes whose first statement is not a guard. */
export function listUnguarded(files: readonly SourceFile[], open: ReadonlySet<string>): string[] {
  return files
    .filter(({ path }) => path.startsWith('app/routes/') && !open.has(path))
    .flatMap(({ path, text }) => {
      const source = ts.createSourceFile(path, text, ts.ScriptTarget.Latest, true, ts.ScriptKind.TSX)
      return source.statements
        .flatMap((s) => firstStatement(s, source))
        .filter(([, first]) => !/^(const [^=]+ = |return )?\(?await require[A-Z]/.test(first))
        .map(([name]) => `${path}: the first statement of ${name} is not a guard`)
    })
}

/** Files of the house that git tracks or would track, with their text. */
export function readFiles(paths: readonly string[]): SourceFile[] {
  return paths.map((path) => ({ path, text: readFileSync(path, 'utf8') }))
}
