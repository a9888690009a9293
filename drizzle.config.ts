import { defineConfig } from 'drizzle-kit';

/** `npx drizzle-kit generate --name WHAT` writes the next migration from the difference to the last one. */
export default defineConfig({
  dialect: 'postgresql',
  schema: './server/db/schema/index.ts',
  out: './drizzle',
  casing: 'snake_case',
});
