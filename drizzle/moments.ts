import { timestamp } from 'drizzle-orm/pg-core'

/** A moment with its time zone. */
export const at = () => timestamp({ withTimezone: true })

/** A moment that is never missing: by default when the row was written. */
export const now = () => at().notNull().defaultNow()
