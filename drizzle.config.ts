import { defineConfig } from 'drizzle-kit';

/** Migrations are generated from the schema (`npm run migration`) and applied by src/db/migrate.server.ts. */
export default defineConfig({ dialect: 'sqlite', schema: './src/db/schema.ts', out: './drizzle' });
