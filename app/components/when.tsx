import { useSyncExternalStore } from 'react'

const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']
const nothing = () => () => undefined
const two = (value: number) => String(value).padStart(2, '0')

function nearWords(at: Date, now: Date): string {
  const days = Math.round((midnight(now) - midnight(at)) / 86_400_000)
  const time = `${two(at.getHours())}:${two(at.getMinutes())}`
  if (days === 0) return `Today ${time}`
  if (days === 1) return `Yesterday ${time}`
  const year = at.getFullYear() === now.getFullYear() ? '' : ` ${at.getFullYear()}`
  return `${at.getDate()} ${months[at.getMonth()]}${year}`
}

const midnight = (at: Date) => new Date(at.getFullYear(), at.getMonth(), at.getDate()).getTime()

/** A moment: the server, which does not know the reader's clock, writes the date; the browser writes it near to now. */
export function When({ at }: { at: string }) {
  const near = useSyncExternalStore(
    nothing,
    () => true,
    () => false,
  )
  const moment = new Date(at)
  const plain = `${moment.getUTCDate()} ${months[moment.getUTCMonth()]} ${moment.getUTCFullYear()}`
  return <time dateTime={at}>{near ? nearWords(moment, new Date()) : plain}</time>
}
