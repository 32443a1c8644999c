import { defineConfig } from 'drizzle-kit'

// `generate` compares the schema with the last migration and needs no database.
export default defineConfig({
  dialect: 'mysql',
  schema: './drizzle/schema/index.ts',
  out: './drizzle/migrations',
  casing: 'snake_case',
})
