import { demoLines } from '../../simulator/network/demo-lines';
import { storyLines } from '../../simulator/stories/story-lines';
import { renewFindings } from '../../src/ingest/verdict/standing-findings';
import type { Store } from '../../src/store/client';
import { writeLevels } from '../../src/store/levels';
import { readRegisterLine } from '../../src/store/register';
import { insertLine } from '../../src/store/register-edit';
import { demoHistoryOf, demoRosterLine } from '../ingest/demo-history';

const DAY_MS = 86_400_000;
const SAMPLE_MS = 20 * 60_000;

/** The midnight that stories are told around: the last one. */
export const storyMidnightMs = (): number => Math.floor(Date.now() / DAY_MS) * DAY_MS;
/** The day on which something was done so many days before that midnight. */
export const storyDay = (daysBefore: number): string =>
  new Date(storyMidnightMs() - daysBefore * DAY_MS).toISOString().slice(0, 10);

/**
 * A line of the demo network or of the stories with its past: in the register, with hour and day rows by the product's
 * own evaluation, and with what the worker's own look finds in them.
 */
export async function storedStory(store: Store, key: string, days: number): Promise<void> {
  const entry = [...demoLines, ...storyLines].find((one) => one.key === key)!;
  const nowMs = storyMidnightMs();
  const added = await insertLine(store, entry, { by: { id: 'test', name: 'Test' }, nowMs });
  if (!added.ok) throw new Error(added.problem.problem);
  const { id } = (await readRegisterLine(store, key))!;
  const line = { ...demoRosterLine(key), id };
  const history = demoHistoryOf(line, { nowMs, epochMs: nowMs, days, sampleMs: SAMPLE_MS });
  await writeLevels(store, 'day', history.days);
  await writeLevels(store, 'hour', history.hours);
  await renewFindings(store, line, { nowMs, nearRatio: 0.7, frequencyHz: 50 });
}
