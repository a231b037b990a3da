import { expect, it, vi } from 'vitest'
import { askOneAtATime } from '#app/editor/asking.ts'

/** A slow thing whose answers the test gives by hand. */
function slowThing() {
  const open: { question: string; answer: (text: string) => void; fail: (reason: Error) => void }[] = []
  const heard: string[] = []
  const failures: unknown[] = []
  const asking = askOneAtATime<string, string>(
    (question) =>
      new Promise((resolve, reject) => {
        open.push({ question, answer: resolve, fail: reject })
      }),
    { answered: (answer) => heard.push(answer), failed: (reason) => failures.push(reason) },
  )
  return { asking, open, heard, failures }
}

it('has one question in flight; only the newest waits', async () => {
  const { asking, open, heard } = slowThing()
  for (const question of ['a', 'b', 'c', 'd']) asking.ask(question)
  expect(open.map((o) => o.question)).toEqual(['a'])
  open[0]?.answer('A')
  await vi.waitFor(() => expect(open.map((o) => o.question)).toEqual(['a', 'd']))
  open[1]?.answer('D')
  await vi.waitFor(() => expect(heard).toEqual(['A', 'D']))
  expect(open).toHaveLength(2)
})

it('never tells a cancelled answer, and asks again afterwards', async () => {
  const { asking, open, heard } = slowThing()
  asking.ask('a')
  asking.ask('b')
  asking.cancel()
  asking.ask('c')
  open[0]?.answer('A')
  await vi.waitFor(() => expect(open.map((o) => o.question)).toEqual(['a', 'c']))
  open[1]?.answer('C')
  await vi.waitFor(() => expect(heard).toEqual(['C']))
})

it('tells a failure and goes on', async () => {
  const { asking, open, heard, failures } = slowThing()
  asking.ask('a')
  asking.ask('b')
  open[0]?.fail(new Error('broken'))
  await vi.waitFor(() => expect(open).toHaveLength(2))
  open[1]?.answer('B')
  await vi.waitFor(() => expect(heard).toEqual(['B']))
  expect(failures).toHaveLength(1)
})
