import { defineConfig } from 'drizzle-kit';

/** `npx drizzle-kit generate --name what-it-does` writes the next migration from the schema files. */
export default defineConfig({
  dialect: 'sqlite',
  schema: [
    './libs/db/schema/club.ts',
    './libs/db/schema/sign-in.ts',
    './libs/db/schema/film.ts',
    './libs/db/schema/repeatability.ts',
    './libs/db/schema/review.ts',
    './libs/db/schema/targets.ts',
    './libs/db/schema/scale.ts',
    './libs/db/schema/view.ts',
    './libs/db/schema/mail.ts',
    './libs/db/schema/timing.ts',
  ],
  out: './libs/db/migrations',
  casing: 'snake_case',
});
