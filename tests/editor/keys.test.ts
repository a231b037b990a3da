import { expect, it } from 'vitest'
import { keyActionOf } from '#app/editor/tools/keys.ts'

const press = (key: string, held: Partial<Record<'shiftKey' | 'ctrlKey' | 'metaKey' | 'altKey', boolean>> = {}) =>
  keyActionOf({ key, shiftKey: false, ctrlKey: false, metaKey: false, altKey: false, ...held })

it.each([
  ['ArrowUp', {}, { kind: 'nudge', dx: 0, dy: 0.01 }],
  ['ArrowLeft', { shiftKey: true }, { kind: 'nudge', dx: -0.1, dy: 0 }],
  ['PageDown', { shiftKey: true }, { kind: 'raise', by: -0.1 }],
  ['{', { shiftKey: true }, { kind: 'turn', by: 15 }],
  ['.', {}, { kind: 'tilt', by: 1 }],
  ['z', { ctrlKey: true }, { kind: 'undo' }],
  ['Z', { metaKey: true, shiftKey: true }, { kind: 'redo' }],
  ['d', { metaKey: true }, { kind: 'duplicate' }],
  ['Delete', {}, { kind: 'remove' }],
  ['Escape', {}, { kind: 'let go' }],
])('%s with %o', (key, held, action) => expect(press(key, held)).toEqual(action))

it.each([
  ['p', { ctrlKey: true }],
  ['ArrowLeft', { altKey: true }],
  ['q', {}],
  ['Tab', {}],
])('%s with %o is left to the browser', (key, held) => expect(press(key, held)).toBeNull())
