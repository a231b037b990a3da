/** What a key means on the plan. Lengths m, angles degrees. */
export type KeyAction =
  | { kind: 'nudge'; dx: number; dy: number }
  | { kind: 'raise'; by: number }
  | { kind: 'turn'; by: number }
  | { kind: 'tilt'; by: number }
  | { kind: 'remove' | 'duplicate' | 'copy' | 'paste' | 'undo' | 'redo' | 'select all' | 'let go' | 'whole plan' }
  | { kind: 'enlarge'; factor: number }

/** The part of a key event that matters. */
export interface KeyPress {
  readonly key: string
  readonly shiftKey: boolean
  readonly ctrlKey: boolean
  readonly metaKey: boolean
  readonly altKey: boolean
}

const arrows: Record<string, readonly [number, number]> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, 1],
  ArrowDown: [0, -1],
}

const withControl: Record<
  string,
  KeyAction['kind'] & ('duplicate' | 'copy' | 'paste' | 'undo' | 'redo' | 'select all')
> = {
  d: 'duplicate',
  c: 'copy',
  v: 'paste',
  z: 'undo',
  y: 'redo',
  a: 'select all',
}

/**
 * Arrows nudge 10 mm, with Shift 100 mm; Page Up and Page Down raise and lower by the same; [ ] turn 1° (Shift 15°),
 * , . tilt 1° (Shift 5°). Delete, Escape, +, −, 0 and the usual ones with Ctrl or Cmd. null: the key means nothing here.
 */
export function keyActionOf(press: KeyPress): KeyAction | null {
  if (press.ctrlKey || press.metaKey) {
    if (press.key.toLowerCase() === 'z' && press.shiftKey) return { kind: 'redo' }
    const kind = withControl[press.key.toLowerCase()]
    return kind ? { kind } : null
  }
  if (press.altKey) return null
  const far = press.shiftKey ? 0.1 : 0.01
  const arrow = arrows[press.key]
  if (arrow) return { kind: 'nudge', dx: arrow[0] * far || 0, dy: arrow[1] * far || 0 }
  switch (press.key) {
    case 'PageUp':
      return { kind: 'raise', by: far }
    case 'PageDown':
      return { kind: 'raise', by: -far }
    case '[':
    case '{':
      return { kind: 'turn', by: press.shiftKey ? 15 : 1 }
    case ']':
    case '}':
      return { kind: 'turn', by: press.shiftKey ? -15 : -1 }
    case ',':
    case '<':
      return { kind: 'tilt', by: press.shiftKey ? -5 : -1 }
    case '.':
    case '>':
      return { kind: 'tilt', by: press.shiftKey ? 5 : 1 }
    case 'Delete':
    case 'Backspace':
      return { kind: 'remove' }
    case 'Escape':
      return { kind: 'let go' }
    case '+':
    case '=':
      return { kind: 'enlarge', factor: 1.25 }
    case '-':
      return { kind: 'enlarge', factor: 0.8 }
    case '0':
      return { kind: 'whole plan' }
    default:
      return null
  }
}
