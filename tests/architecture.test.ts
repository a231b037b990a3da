import { execFileSync } from 'node:child_process'
import { describe, expect, it } from 'vitest'
import { listBadNames, listBrokenArrows, listCircles, listUnguarded, readFiles } from './architecture.ts'

const paths = execFileSync('git', ['ls-files', '--cached', '--others', '--exclude-standard'], { encoding: 'utf8' })
  .split('\n')
  .filter((path) => /^(app|drizzle|workers)\/.*\.tsx?$/.test(path))
const files = readFiles(paths)

/** Pages that anybody may open: they hold nothing of an organisation. */
const openRoutes = new Set([
  'app/routes/account/sign-in.tsx',
  'app/routes/account/sign-out.ts',
  'app/routes/account/reset-password.tsx',
  'app/routes/account/new-password.tsx',
  'app/routes/account/outbox.tsx',
  'app/routes/healthz.ts',
  'app/routes/readyz.ts',
  'app/routes/not-found.tsx',
])

describe('the house', () => {
  it('has files to look at', () => expect(files.length).toBeGreaterThan(20))
  it('has arrows only where the table allows them', () => expect(listBrokenArrows(files)).toEqual([]))
  it('has no circles, type imports included', () => expect(listCircles(files)).toEqual([]))
  it('names its files in its own style', () => expect(listBadNames(paths)).toEqual([]))
  it('guards every loader and action in its first statement', () =>
    expect(listUnguarded(files, openRoutes)).toEqual([]))
  it('holds nothing at the top that is not on the plan', () => {
    const top = execFileSync('git', ['ls-files'], { encoding: 'utf8' })
      .split('\n')
      .map((path) => path.split('/')[0] ?? '')
    const plan =
      /^(app|drizzle|workers|public|tests|README\.md|DEVELOPERS\.md|package(-lock)?\.json|tsconfig\.json|vite\.config\.ts|react-router\.config\.ts|drizzle\.config\.ts|vitest\.config\.ts|playwright\.config\.ts|eslint\.config\.js|\..*|)$/
    expect([...new Set(top)].filter((name) => !plan.test(name))).toEqual([])
  })
})

describe('the check of the house sees', () => {
  const broken = (path: string, text: string) => listBrokenArrows([{ path, text }])
  it.each([
    ['app/domain/x.ts', "import { useState } from 'react'"],
    ['app/domain/x.ts', "import fs from 'node:fs'"],
    ['app/domain/x.ts', "export * from '#app/drawing/plan/floor.tsx'"],
    ['app/domain/x.ts', "const a = await import('#app/server/db.server.ts')"],
    ['app/drawing/x.tsx', "import useSWR from 'swr'"],
    ['app/drawing/x.tsx', "import type { X } from '#app/components/button.tsx'"],
    ['app/components/x.tsx', "import { heaterFrame } from '../domain/layout/body.ts'"],
    ['app/editor/x.ts', "import { db } from '#app/server/db.server.ts'"],
    ['app/editor/x.ts', "import { answer } from '#workers/flux.worker.ts'"],
    ['app/server/x.server.ts', "import { Button } from '#app/components/button.tsx'"],
    ['app/routes/x.tsx', "import { loader } from '#app/routes/jobs/list.tsx'"],
    ['app/routes/x.tsx', "import { jobs } from '#drizzle/schema.ts'"],
    ['workers/flux.worker.ts', "import { db } from '#app/server/db.server.ts'"],
    ['workers/flux.worker.ts', "import { plan } from '#app/drawing/plan/plan-view.ts'"],
    ['drizzle/x.ts', "import { db } from '#app/server/db.server.ts'"],
    ['elsewhere/x.ts', ''],
  ])('a wrong arrow in %s: %s', (path, text) => expect(broken(path, text)).toHaveLength(1))
  it.each([
    ['app/domain/x.ts', "export type X = 'admin' | 'import'"],
    ['app/domain/x.ts', "// import { a } from 'react'"],
    ['app/editor/x.ts', "import type { Api } from '#workers/flux.worker.ts'"],
    ['app/routes/x.tsx', "import type { Route } from './+types/x'"],
  ])('nothing wrong in %s: %s', (path, text) => expect(broken(path, text)).toEqual([]))
  it('a circle through a type import', () => {
    const a = { path: 'app/domain/a.ts', text: "import type { B } from './b.ts'" }
    const b = { path: 'app/domain/b.ts', text: "import { a } from '#app/domain/a.ts'" }
    expect(listCircles([a, b])).toHaveLength(1)
  })
  it('a name that says nothing and a server file without its suffix', () => {
    expect(listBadNames(['app/domain/utils.ts', 'app/server/db.ts', 'app/domain/heatMap.ts'])).toHaveLength(3)
  })
  it('a loader without a guard', () => {
    const bare = {
      path: 'app/routes/x.tsx',
      text: 'export async function loader() { const a = 1; await requireMember() }',
    }
    const guarded = {
      path: 'app/routes/y.tsx',
      text: 'export async function action({ request }: A) { const m = await requireMember(request) }',
    }
    expect(listUnguarded([bare, guarded], new Set())).toEqual([
      'app/routes/x.tsx: the first statement of loader is not a guard',
    ])
  })
})
