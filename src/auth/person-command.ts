import { parseArgs } from 'node:util';
import { z } from 'zod';
import { ROLES } from '../contract/role';
import { firstAdminSettings, SettingsError } from '../settings';
import { createStore, type Store } from '../store/client';
import { databaseIsAway } from '../store/database-away';
import { emailSchema } from './credentials';

/** What the commands that add people by one-time link have in common. */

const nameSchema = z
  .string('Give a name.')
  .trim()
  .min(1, 'Give a name.')
  .max(80, 'A name has at most 80 characters.');

export const adminArguments = z.object({ email: emailSchema, name: nameSchema });
export const inviteArguments = z.object({
  email: emailSchema,
  name: nameSchema,
  role: z.enum(ROLES, 'Give a role: operator, engineer, planner or admin.'),
});

export interface PersonCommand<Person> {
  readonly usage: string;
  readonly arguments: z.ZodType<Person>;
  /** what the link is printed under, once it has been made */
  announcement(person: Person): string;
  make(
    store: Store,
    person: Person & { publicUrl: string; nowMs: number },
  ): Promise<{ kind: string; link: string } | { kind: 'refused'; problem: string }>;
}

/** Runs a command against the database of the environment; says the exit code. */
export async function runPersonCommand<Person>(command: PersonCommand<Person>): Promise<number> {
  const person = wanted(command);
  if (person === undefined) return 1;
  try {
    const settings = firstAdminSettings();
    const store = createStore(settings.DATABASE_URL);
    try {
      const outcome = await command.make(store, {
        ...person,
        publicUrl: settings.PUBLIC_URL,
        nowMs: Date.now(),
      });
      if ('problem' in outcome) return failed(outcome.problem);
      console.log(command.announcement(person));
      console.log(outcome.link);
      return 0;
    } finally {
      await store.close();
    }
  } catch (error) {
    if (error instanceof SettingsError) return failed(error.message);
    const reason = databaseIsAway(error)
      ? 'the database at DATABASE_URL does not answer'
      : rootMessage(error as Error);
    return failed(`Nobody was added: ${reason}.`);
  }
}

function wanted<Person>({ arguments: schema, usage }: PersonCommand<Person>): Person | undefined {
  const option = { type: 'string' } as const;
  try {
    const { values } = parseArgs({ options: { email: option, name: option, role: option } });
    const parsed = schema.safeParse(values);
    if (parsed.success) return parsed.data;
    console.error(
      parsed.error.issues.map((issue) => `--${issue.path.join('.')}: ${issue.message}`).join('\n'),
    );
  } catch (error) {
    console.error((error as Error).message);
  }
  console.error(usage);
  return undefined;
}

function failed(sentence: string): number {
  console.error(sentence);
  return 1;
}

function rootMessage(error: Error): string {
  return error.cause instanceof Error ? rootMessage(error.cause) : error.message;
}
