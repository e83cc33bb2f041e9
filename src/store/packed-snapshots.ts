import { and, asc, eq, gt, lt } from 'drizzle-orm';
import type { Store } from './client';
import { snapshot } from './schema/snapshots';

/** A raw row as far as every figure can be computed again from it. */
export interface PackedSnapshot {
  readonly at: Date;
  readonly phasors: Buffer;
}

/** The next `most` raw rows of a line after an instant and before `to`, oldest first, by the primary key. */
export async function readPackedAfter(
  store: Store,
  lineId: number,
  { after, to, most }: { after: Date; to: Date; most: number },
): Promise<PackedSnapshot[]> {
  return store.db
    .select({ at: snapshot.at, phasors: snapshot.phasors })
    .from(snapshot)
    .where(and(eq(snapshot.lineId, lineId), gt(snapshot.at, after), lt(snapshot.at, to)))
    .orderBy(asc(snapshot.at))
    .limit(most);
}
