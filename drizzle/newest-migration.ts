import journal from '#drizzle/migrations/meta/_journal.json'

/** Time of the newest migration of this version of the application: a database that has it is up to date. */
export const newestMigration: number = Math.max(...journal.entries.map((entry) => entry.when))
