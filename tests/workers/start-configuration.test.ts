import { execFileSync } from 'node:child_process'
import { copyFileSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, expect, it } from 'vitest'

const program = 'workers/start-configuration.ts'
let checkout: string
beforeEach(() => {
  checkout = mkdtempSync(path.join(tmpdir(), 'inglefield-env-'))
  mkdirSync(path.join(checkout, 'workers'))
  copyFileSync(program, path.join(checkout, program))
})
afterEach(() => rmSync(checkout, { recursive: true }))

/** What the environment says after the file was read, and everything that was printed. */
function read(env: Record<string, string>) {
  const script = `import(${JSON.stringify(path.join(checkout, program))})
    .then(() => console.log(JSON.stringify([process.env.PORT, process.env.MAIL_FROM])))`
  const output = execFileSync(process.execPath, ['--import', 'tsx', '--eval', script], {
    env: { PATH: process.env['PATH'], ...env },
    encoding: 'utf8',
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  return output.trim()
}

it('reads rows of .env, from whatever folder it is started; the environment itself comes first', () => {
  writeFileSync(path.join(checkout, '.env'), '# where\nPORT=3100\nMAIL_FROM="office@terraces.example"\n')
  expect(read({})).toBe('["3100","office@terraces.example"]')
  expect(read({ PORT: '3200' })).toBe('["3200","office@terraces.example"]')
})

it('says nothing where there is none', () => {
  expect(read({})).toBe('[null,null]')
})
