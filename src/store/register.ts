import { asc, eq, inArray } from 'drizzle-orm';
import type { AnyMySqlColumn } from 'drizzle-orm/mysql-core';
import { inZoneTransformerSchema, type RegisterLine } from '../contract/register';
import type { SettingsVersion } from '../contract/settings-version';
import type { Store } from './client';
import { groupedBy } from './grouped';
import { line, registerRevision, settingRecord, substation, terminal } from './schema/register';

/** A line as the register holds it, with the database's own ids. */
export interface RegisteredLine extends RegisterLine {
  readonly id: number;
  readonly terminalIds: ReadonlyMap<string, number>;
}

/** The whole register; terminals in position order, settings oldest first. */
export const readRegister = (store: Store): Promise<RegisteredLine[]> => readLines(store, undefined);

export async function readRegisterLine(store: Store, key: string): Promise<RegisteredLine | undefined> {
  return (await readLines(store, key))[0];
}

async function readLines(store: Store, key: string | undefined): Promise<RegisteredLine[]> {
  const asked = key === undefined ? undefined : eq(line.key, key);
  const own = (lineId: AnyMySqlColumn) =>
    key === undefined
      ? undefined
      : inArray(lineId, store.db.select({ id: line.id }).from(line).where(eq(line.key, key)));
  const [lines, terminals, settings] = await Promise.all([
    store.db.select().from(line).where(asked).orderBy(asc(line.name)),
    store.db
      .select({ terminal, substationName: substation.name })
      .from(terminal)
      .innerJoin(substation, eq(terminal.substation, substation.key))
      .where(own(terminal.lineId))
      .orderBy(asc(terminal.position)),
    store.db
      .select()
      .from(settingRecord)
      .where(own(settingRecord.lineId))
      .orderBy(asc(settingRecord.validFrom), asc(settingRecord.id)),
  ]);
  const terminalsOf = groupedBy(terminals, (row) => row.terminal.lineId);
  const settingsOf = groupedBy(settings, (row) => row.lineId);
  return lines.map((row) => {
    const own = terminalsOf.get(row.id) ?? [];
    return {
      ...row,
      // Entries from before the terminals behind a transformer were kept lack them
      inZoneTransformer: row.inZoneTransformer && inZoneTransformerSchema.parse(row.inZoneTransformer),
      terminals: own.map(({ terminal: { id: _id, lineId: _lineId, ...rest }, substationName }) => ({
        ...rest,
        substationName,
      })),
      terminalIds: new Map(own.map(({ terminal: { key, id } }) => [key, id])),
      settings: (settingsOf.get(row.id) ?? []).map(settingsVersion),
    };
  });
}

export async function readRegisterRevision(store: Store): Promise<number> {
  const [row] = await store.db.select().from(registerRevision);
  return row?.revision ?? 0;
}

function settingsVersion(row: typeof settingRecord.$inferSelect): SettingsVersion {
  const { lineId: _lineId, ...rest } = row;
  return { ...rest, validFrom: row.validFrom.toISOString(), recordedAt: row.recordedAt.toISOString() };
}

/** The version of a line's settings in force at an instant: the newest that was valid by then. */
export function settingsInForce(
  settings: readonly SettingsVersion[],
  atMs: number,
): SettingsVersion | undefined {
  return settings.findLast((version) => Date.parse(version.validFrom) <= atMs);
}
