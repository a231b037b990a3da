import { defineConfig } from 'drizzle-kit'

export default defineConfig({
  dialect: 'postgresql',
  schema: [
    './drizzle/schema.ts',
    './drizzle/photo-schema.ts',
    './drizzle/hanging-schema.ts',
    './drizzle/rules-schema.ts',
  ],
  out: './drizzle/migrations',
  casing: 'snake_case',
})
