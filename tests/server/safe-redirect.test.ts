import { describe, expect, it } from 'vitest'
import { safePath } from '#app/server/safe-redirect.server.ts'

describe('where a person may be sent on to', () => {
  it.each([
    ['/jobs', '/jobs'],
    ['/', '/'],
    ['/jobs/1/compare?variants=1,3#maps', '/jobs/1/compare?variants=1,3#maps'],
    ['/jobs?next=//evil.example', '/jobs?next=//evil.example'],
    ['/a/../jobs', '/jobs'],
    ['/jobs/größe', '/jobs/gr%C3%B6%C3%9Fe'],
  ])('%j stays inside', (wanted, path) => expect(safePath(wanted)).toBe(path))

  it.each([
    '//evil.example',
    '///evil.example',
    '/\\evil.example',
    '\\\\evil.example',
    '/\t/evil.example',
    '/\n/evil.example',
    '\t//evil.example',
    ' //evil.example',
    'https://evil.example',
    'https:evil.example',
    'javascript:alert(1)',
    'data:text/html,x',
    'jobs',
    '?next=/jobs',
    '#x',
    '',
    '/a\r\nSet-Cookie: x=1',
    '/a/..//evil.example\\',
    '/\u0000/evil.example',
    `/${'a'.repeat(3000)}`,
    null,
    undefined,
    7,
    ['/jobs'],
  ])('%j leads to the jobs instead', (wanted) => expect(safePath(wanted)).toBe('/jobs'))

  it.each(['/a/..//evil.example', '/.//evil.example', '/%2e%2e//evil.example', '/x/../..//evil.example'])(
    '%j does not become another host on the way',
    (wanted) => {
      const path = safePath(wanted)
      expect(new URL(path, 'http://here.example').host).toBe('here.example')
    },
  )
})
