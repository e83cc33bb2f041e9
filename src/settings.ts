import { z } from 'zod';

/** The environment, read once at start, by schema. Every wrong or missing value is named in one error. */

const url = (protocols: readonly string[]) =>
  z
    .string()
    .refine(
      (value) => URL.canParse(value) && protocols.includes(new URL(value).protocol),
      `is an address that begins with ${protocols.map((protocol) => `${protocol}//`).join(' or ')}`,
    );
const count = (least: number, most: number) =>
  z.coerce
    .number('is a number')
    .int('is a whole number')
    .min(least, `is at least ${least}`)
    .max(most, `is at most ${most}`);
const timeZone = z.string().refine((zone) => {
  try {
    return new Intl.DateTimeFormat('en', { timeZone: zone }) !== undefined;
  } catch {
    return false;
  }
}, 'is a time zone such as Europe/Berlin');

const database = { DATABASE_URL: url(['mysql:', 'mariadb:']) };
const broker = {
  BROKER_URL: url(['mqtt:', 'mqtts:', 'ws:', 'wss:']),
  BROKER_USERNAME: z.string().optional(),
  BROKER_PASSWORD: z.string().optional(),
};
/** what people type into their browser; links, cookies and same-origin checks go by it */
const address = { PUBLIC_URL: url(['http:', 'https:']) };
const judgement = {
  NEAR_RATIO: z.coerce
    .number('is a number')
    .min(0.1, 'is at least 0.1')
    .max(0.99, 'is at most 0.99')
    .default(0.7),
  /** the system's nominal frequency, by which line constants become charging currents */
  NOMINAL_FREQUENCY_HZ: z.coerce
    .number('is a number')
    .refine((hertz) => hertz === 50 || hertz === 60, 'is 50 or 60')
    .default(50),
  PERIOD_MS: count(100, 60_000).default(2_000),
};

const databaseSchema = z.object(database);
const rebuildSchema = z.object({ ...database, NOMINAL_FREQUENCY_HZ: judgement.NOMINAL_FREQUENCY_HZ });
const ingestSchema = z
  .object({
    ...database,
    ...broker,
    ...judgement,
    WORKER_INDEX: count(0, 999).default(0),
    WORKER_COUNT: count(1, 1000).default(1),
    LATENESS_MS: count(100, 60_000).default(2_000),
    RAW_DAYS: count(1, 400).default(14),
    MINUTE_DAYS: count(1, 4_000).default(90),
    HOUR_DAYS: count(30, 40_000).default(3_650),
    CLOCK_LIMIT_US: count(1, 1_000_000).default(100),
    MQTT_VERSION: z.enum(['4', '5']).default('4'),
  })
  .refine((env) => env.WORKER_INDEX < env.WORKER_COUNT, {
    path: ['WORKER_INDEX'],
    message: 'is below WORKER_COUNT (workers count from 0)',
  });
const firstAdminSchema = z.object({ ...database, ...address });
const webSchema = z.object({
  ...database,
  ...broker,
  ...judgement,
  HOST: z.string().default('127.0.0.1'),
  PORT: count(1, 65_535).default(8720),
  ...address,
  TRUST_PROXY: z.enum(['yes', 'no']).default('no'),
  SITE_NAME: z.string().max(60).default('Tareline'),
  SITE_TIME_ZONE: timeZone.default('UTC'),
  PHASE_LETTERS: z
    .string()
    .regex(
      /^[^,\s]{1,3},[^,\s]{1,3},[^,\s]{1,3}$/,
      'is three letters parted by commas, such as A,B,C or L1,L2,L3',
    )
    .default('A,B,C'),
});

export type DatabaseSettings = z.infer<typeof databaseSchema>;
export type IngestSettings = z.infer<typeof ingestSchema>;
export type FirstAdminSettings = z.infer<typeof firstAdminSchema>;
export type WebSettings = z.infer<typeof webSchema>;

/** Raised when the environment does not hold what a process needs; the message lists every fault. */
export class SettingsError extends Error {}

type Environment = Readonly<Record<string, string | undefined>>;

function parse<T extends z.ZodType>(schema: T, environment: Environment): z.infer<T> {
  const filled = Object.fromEntries(Object.entries(environment).filter(([, value]) => value !== ''));
  const parsed = schema.safeParse(filled);
  if (parsed.success) return parsed.data;
  const faults = parsed.error.issues.map((issue) => {
    const name = issue.path.join('.');
    return filled[name] === undefined
      ? `  ${name} is missing; it ${issue.message.replace(/^Invalid input.*/, 'must be set')}`
      : `  ${name} ${issue.message}`;
  });
  throw new SettingsError(`The environment needs mending:\n${faults.join('\n')}`);
}

export const databaseSettings = (environment: Environment = process.env): DatabaseSettings =>
  parse(databaseSchema, environment);
export const rebuildSettings = (environment: Environment = process.env): z.infer<typeof rebuildSchema> =>
  parse(rebuildSchema, environment);
export const ingestSettings = (environment: Environment = process.env): IngestSettings =>
  parse(ingestSchema, environment);
export const webSettings = (environment: Environment = process.env): WebSettings =>
  parse(webSchema, environment);
export const firstAdminSettings = (environment: Environment = process.env): FirstAdminSettings =>
  parse(firstAdminSchema, environment);
