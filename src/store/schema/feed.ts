import { bigint, index, int, mysqlEnum, mysqlTable, primaryKey, varchar } from 'drizzle-orm/mysql-core';
import { REFUSAL_REASONS } from '../../contract/feed';
import { bytes, instant } from './columns';
import { terminal } from './register';

export const refusedMessage = mysqlTable(
  'refused_message',
  {
    id: bigint('id', { mode: 'number' }).autoincrement().primaryKey(),
    at: instant('at').notNull(),
    topic: varchar('topic', { length: 255 }).notNull(),
    reason: mysqlEnum('reason', REFUSAL_REASONS).notNull(),
    detail: varchar('detail', { length: 500 }).notNull(),
    payload: bytes('payload', { length: 2048 }).notNull(),
  },
  (table) => [index('refused_message_at').on(table.at)],
);

/** Counts outlive the kept messages. */
export const refusalCount = mysqlTable(
  'refusal_count',
  {
    reason: mysqlEnum('reason', REFUSAL_REASONS).notNull(),
    count: bigint('count', { mode: 'number' }).notNull(),
    lastAt: instant('last_at').notNull(),
  },
  (table) => [primaryKey({ columns: [table.reason] })],
);

export const terminalState = mysqlTable('terminal_state', {
  terminalId: int('terminal_id')
    .primaryKey()
    .references(() => terminal.id, { onDelete: 'cascade' }),
  presence: mysqlEnum('presence', ['online', 'offline']),
  lastAt: instant('last_at'),
  heardAt: instant('heard_at'),
  lastSeq: bigint('last_seq', { mode: 'number' }),
  gapCount: int('gap_count').notNull(),
  missedCount: int('missed_count').notNull(),
});
