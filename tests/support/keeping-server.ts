import type { DeviceCopy, Kept, Keeping, SaveAnswer, SaveRequest } from '#app/editor/keeping.ts'

/** A server that keeps one thing by the PUT rule, with an idempotency table, a device and a cable that can be pulled. */
export function keepingServer<T>(initial: Kept<T>) {
  let kept = initial
  let cable: 'in' | 'out' | 'answers lost' = 'in'
  let device: DeviceCopy<T> | null = null
  const answers = new Map<string, { body: T; answer: SaveAnswer<T> }>()
  const requests: SaveRequest<T>[] = []
  const keeping: Keeping<T> = {
    newSaveId: () => `save-${requests.length}-${Math.floor(performance.now() * 1000)}`,
    keepOnDevice: (copy) => {
      device = copy
    },
    findOnDevice: () => Promise.resolve(device),
    save: async (request) => {
      requests.push(request)
      await Promise.resolve()
      if (cable === 'out') return { kind: 'unreachable' }
      const known = answers.get(request.saveId)
      if (known && known.body !== request.body) throw new Error('same key, other body')
      const answer: SaveAnswer<T> =
        known?.answer ??
        (request.revision === kept.revision
          ? { kind: 'saved', revision: kept.revision + 1 }
          : { kind: 'conflict', current: kept, by: 'Ann Other', at: new Date(0) })
      if (!known && answer.kind === 'saved') kept = { body: request.body, revision: answer.revision }
      answers.set(request.saveId, { body: request.body, answer })
      return cable === 'answers lost' ? { kind: 'unreachable' } : answer
    },
  }
  return {
    keeping,
    requests,
    kept: () => kept,
    device: () => device,
    pull: (next: typeof cable) => {
      cable = next
    },
    elsewhere: (body: T) => {
      kept = { body, revision: kept.revision + 1 }
    },
  }
}
