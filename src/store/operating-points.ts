import { and, asc, eq, gte, inArray, lt } from 'drizzle-orm';
import type { Store } from './client';
import { snapshot } from './schema/snapshots';

const COLUMNS = {
  at: snapshot.at,
  flags: snapshot.flags,
  throughAmps: snapshot.throughAmps,
  settingRecordId: snapshot.settingRecordId,
  differentialAAmps: snapshot.differentialAAmps,
  differentialBAmps: snapshot.differentialBAmps,
  differentialCAmps: snapshot.differentialCAmps,
  restraintAAmps: snapshot.restraintAAmps,
  restraintBAmps: snapshot.restraintBAmps,
  restraintCAmps: snapshot.restraintCAmps,
} as const;

/** A raw row as far as it says where the phases lay, and whether it counts. */
export type OperatingPointRow = Pick<typeof snapshot.$inferSelect, keyof typeof COLUMNS>;

/** The operating points of a line in [from, to), oldest first. */
export async function readOperatingPoints(
  store: Store,
  lineId: number,
  { from, to }: { from: Date; to: Date },
): Promise<OperatingPointRow[]> {
  return store.db
    .select(COLUMNS)
    .from(snapshot)
    .where(and(eq(snapshot.lineId, lineId), gte(snapshot.at, from), lt(snapshot.at, to)))
    .orderBy(asc(snapshot.at));
}

/** The packed measurements of these instants of a line, in no order. */
export async function readPackedAt(
  store: Store,
  lineId: number,
  instantsMs: readonly number[],
): Promise<{ at: Date; phasors: Buffer }[]> {
  if (instantsMs.length === 0) return [];
  const instants = instantsMs.map((atMs) => new Date(atMs));
  return store.db
    .select({ at: snapshot.at, phasors: snapshot.phasors })
    .from(snapshot)
    .where(and(eq(snapshot.lineId, lineId), inArray(snapshot.at, instants)));
}
