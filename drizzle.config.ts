import { defineConfig } from 'drizzle-kit'

export default defineConfig({
  dialect: 'postgresql',
  schema: [
    './drizzle/accounts-schema.ts',
    './drizzle/schema.ts',
    './drizzle/photo-schema.ts',
    './drizzle/house-schema.ts',
    './drizzle/rules-schema.ts',
    './drizzle/beam-schema.ts',
  ],
  out: './drizzle/migrations',
  casing: 'snake_case',
})
