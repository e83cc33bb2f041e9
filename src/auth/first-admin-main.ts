import { parseArgs } from 'node:util';
import { z } from 'zod';
import { firstAdminSettings, SettingsError } from '../settings';
import { createStore } from '../store/client';
import { databaseIsAway } from '../store/database-away';
import { emailSchema } from './credentials';
import { makeFirstAdmin } from './first-admin';

const USAGE = 'Usage: npm run first-admin -- --email you@example.org --name "Your Name"';

const argumentsSchema = z.object({
  email: emailSchema,
  name: z.string('Give a name.').trim().min(1, 'Give a name.').max(80, 'A name has at most 80 characters.'),
});

function wanted(): z.infer<typeof argumentsSchema> | undefined {
  try {
    const { values } = parseArgs({ options: { email: { type: 'string' }, name: { type: 'string' } } });
    const parsed = argumentsSchema.safeParse(values);
    if (parsed.success) return parsed.data;
    console.error(
      parsed.error.issues.map((issue) => `--${issue.path.join('.')}: ${issue.message}`).join('\n'),
    );
  } catch (error) {
    console.error((error as Error).message);
  }
  console.error(USAGE);
  return undefined;
}

async function run(): Promise<number> {
  const admin = wanted();
  if (admin === undefined) return 1;
  const settings = firstAdminSettings();
  const store = createStore(settings.DATABASE_URL);
  try {
    const outcome = await makeFirstAdmin(store, {
      ...admin,
      publicUrl: settings.PUBLIC_URL,
      nowMs: Date.now(),
    });
    if (outcome.kind === 'refused') {
      console.error(outcome.problem);
      return 1;
    }
    console.log(
      `${admin.name} (${admin.email}) is the admin. This link, good once and for 24 hours, sets the password:`,
    );
    console.log(outcome.link);
    return 0;
  } finally {
    await store.close();
  }
}

try {
  process.exitCode = await run();
} catch (error) {
  const reason = databaseIsAway(error)
    ? 'the database at DATABASE_URL does not answer'
    : rootMessage(error as Error);
  console.error(error instanceof SettingsError ? error.message : `The admin was not made: ${reason}.`);
  process.exitCode = 1;
}

function rootMessage(error: Error): string {
  return error.cause instanceof Error ? rootMessage(error.cause) : error.message;
}
