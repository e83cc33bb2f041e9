import { bigint, boolean, index, json, mysqlEnum, mysqlTable, varchar } from 'drizzle-orm/mysql-core';
import { ROLES } from '../../contract/role';
import { instant } from './columns';

export const user = mysqlTable('user', {
  id: varchar('id', { length: 40 }).primaryKey(),
  email: varchar('email', { length: 254 }).notNull().unique(),
  name: varchar('name', { length: 80 }).notNull(),
  role: mysqlEnum('role', ROLES).notNull(),
  /** argon2id; null until the one-time link has been used */
  passwordHash: varchar('password_hash', { length: 255 }),
  createdAt: instant('created_at').notNull(),
});

export const session = mysqlTable('session', {
  id: varchar('id', { length: 255 }).primaryKey(),
  userId: varchar('user_id', { length: 40 })
    .notNull()
    .references(() => user.id, { onDelete: 'cascade' }),
  expiresAt: instant('expires_at').notNull(),
});

/** Only a hash of the token is kept: whoever reads the database cannot use the link. */
export const oneTimeLink = mysqlTable('one_time_link', {
  tokenHash: varchar('token_hash', { length: 64 }).primaryKey(),
  userId: varchar('user_id', { length: 40 })
    .notNull()
    .references(() => user.id, { onDelete: 'cascade' }),
  expiresAt: instant('expires_at').notNull(),
  usedAt: instant('used_at'),
});

export const signInAttempt = mysqlTable(
  'sign_in_attempt',
  {
    id: bigint('id', { mode: 'number' }).autoincrement().primaryKey(),
    at: instant('at').notNull(),
    email: varchar('email', { length: 254 }).notNull(),
    address: varchar('address', { length: 64 }).notNull(),
    succeeded: boolean('succeeded').notNull(),
  },
  (table) => [
    index('sign_in_attempt_email_at').on(table.email, table.at),
    index('sign_in_attempt_address_at').on(table.address, table.at),
  ],
);

export const auditEntry = mysqlTable(
  'audit_entry',
  {
    id: bigint('id', { mode: 'number' }).autoincrement().primaryKey(),
    at: instant('at').notNull(),
    userId: varchar('user_id', { length: 40 }),
    userName: varchar('user_name', { length: 80 }).notNull(),
    action: varchar('action', { length: 60 }).notNull(),
    subject: varchar('subject', { length: 120 }).notNull(),
    detail: json('detail').$type<Record<string, unknown>>().notNull(),
  },
  (table) => [index('audit_entry_at').on(table.at)],
);
