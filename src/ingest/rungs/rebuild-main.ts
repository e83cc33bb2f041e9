import { parseArgs } from 'node:util';
import { z } from 'zod';
import { keySchema } from '../../contract/key';
import { rebuildSettings, SettingsError } from '../../settings';
import { createStore } from '../../store/client';
import { readRegister } from '../../store/register';
import { rebuildWindow } from './rebuild-window';
import { rootReason } from '../retry';
import { rosterLine } from '../roster';

/** npm run rebuild: builds level rows again from the raw rows, to the same numbers. */

const USAGE = 'Usage: npm run rebuild -- --from 2026-03-01 --to 2026-03-08 [--line skelder-hask]';
const instant = z.union([z.iso.date(), z.iso.datetime({ offset: true })], 'Give a date such as 2026-03-01.');
const argumentsSchema = z
  .object({ from: instant, to: instant, line: keySchema.optional() })
  .refine(({ from, to }) => Date.parse(from) < Date.parse(to), {
    path: ['to'],
    message: 'The window begins before it ends.',
  });

async function run(): Promise<number> {
  const option = { type: 'string' } as const;
  const { values } = parseArgs({ options: { from: option, to: option, line: option } });
  const parsed = argumentsSchema.safeParse(values);
  if (!parsed.success) {
    for (const { path, message } of parsed.error.issues) console.error(`--${path.join('.')}: ${message}`);
    console.error(USAGE);
    return 1;
  }
  const { from, to, line } = parsed.data;
  const settings = rebuildSettings();
  const store = createStore(settings.DATABASE_URL);
  try {
    const lines = (await readRegister(store)).filter(({ key }) => line === undefined || key === line);
    if (lines.length === 0) throw new Error(`The register holds no line ${line ?? 'yet'}.`);
    for (const entry of lines) {
      const window = { fromMs: Date.parse(from), toMs: Date.parse(to) };
      const built = await rebuildWindow(store, rosterLine(entry, settings.NOMINAL_FREQUENCY_HZ), window);
      const left =
        built.daysLeft > 0 ? `; ${built.daysLeft} days without all their raw rows left as they are` : '';
      console.log(`${entry.key}: ${built.hours} hours and ${built.days} days built again${left}.`);
    }
    return 0;
  } finally {
    await store.close();
  }
}

try {
  process.exitCode = await run();
} catch (error) {
  console.error(error instanceof SettingsError ? error.message : `Not rebuilt: ${rootReason(error)}.`);
  process.exitCode = 1;
}
