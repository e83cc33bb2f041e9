import type { ReplaySettings } from '../contract/replay';
import { settingsRows } from './line-settings-rows';

const EPOCH = new Date(0).toISOString();

/** Settings by name in words, as the line's page writes a version. */
export function settingsRow(settings: ReplaySettings): ReadonlyMap<string, string> {
  const version = { ...settings, id: 0, validFrom: EPOCH, note: '', recordedBy: '', recordedAt: EPOCH };
  const [row] = settingsRows([version], { nowMs: 0, timeZone: 'UTC' });
  return new Map(row?.values.map(({ name, value }) => [name, value]));
}
