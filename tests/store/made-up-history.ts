import { sql } from 'drizzle-orm';
import type { Store } from '../../src/store/client';

const SUMS_BYTES = 400;

/**
 * Day rows of every phase that has findings, so many days back from a midnight, with sums as heavy as those of two
 * terminals. The database makes them itself: hundreds of thousands would take minutes to send.
 */
export async function storedDays(
  store: Store,
  { midnight, days, lines }: { midnight: Date; days: number; lines?: number },
): Promise<void> {
  await store.db.execute(
    sql`insert ignore into day_level (line_id, phase, start, least_amps, p05_amps, median_amps, p95_amps,
          greatest_amps, mean_restraint_amps, mean_through_amps, greatest_utilisation, qualified_count, all_count,
          disqualified, sums)
        select line_id, phase, date_sub(${midnight}, interval seq day), level_amps * 0.6, level_amps * 0.8,
          level_amps + sin(seq), level_amps * 1.2, level_amps * 1.6, 400, 400, 0.4, 43000, 43200,
          '{"no load":200}', repeat('s', ${SUMS_BYTES})
        from standing_verdict join (select seq from seq_1_to_800) as numbers
        where seq <= ${days} and line_id in
          (select id from (select id from line order by id limit ${lines ?? 1_000_000}) as some)`,
  );
}
