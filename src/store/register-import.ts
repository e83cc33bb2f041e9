import { desc, eq } from 'drizzle-orm';
import type {
  ImportBatch,
  ImportKind,
  ImportReport,
  ImportRow,
  RowProblem,
} from '../contract/register-import';
import type { LinePatch, NewLine, NewSettingsVersion, NewTerminal } from '../contract/register';
import { insertAuditEntry } from './audit';
import type { Store } from './client';
import { lineAddition, lineChange, settingsRecording } from './line-changes';
import { readRegister, readRegisterRevision, type RegisteredLine } from './register';
import {
  lockRegister,
  Refused,
  within,
  type Change,
  type Editing,
  type Transaction,
} from './register-change';
import { importBatch } from './schema/imports';
import { terminalAddition, terminalChange, type TerminalPatch } from './terminal-changes';

/** One change that a file asks for, in the order in which it is to be made. */
export type PlannedChange =
  | { readonly kind: 'new line'; readonly entry: NewLine }
  | { readonly kind: 'line'; readonly key: string; readonly patch: LinePatch }
  | { readonly kind: 'new terminal'; readonly key: string; readonly entry: NewTerminal }
  | {
      readonly kind: 'terminal';
      readonly key: string;
      readonly terminalKey: string;
      readonly patch: TerminalPatch;
    }
  | { readonly kind: 'settings'; readonly key: string; readonly version: NewSettingsVersion };

/** What a file means for the register as it stands. With a single problem nothing of it is written. */
export interface PlannedImport {
  readonly kind: ImportKind | null;
  readonly rows: readonly ImportRow[];
  readonly problems: readonly RowProblem[];
  readonly changes: readonly PlannedChange[];
}

export type Plan = (register: readonly RegisteredLine[]) => PlannedImport;

/** What a file would do; nothing is written. */
export async function dryImport(store: Store, plan: Plan): Promise<ImportReport> {
  const revision = await readRegisterRevision(store);
  return reportOf(plan(await readRegister(store)), { revision });
}

class NothingWritten extends Error {
  constructor(readonly report: ImportReport) {
    super('The import was not written.');
  }
}

/**
 * Writes a file as a whole or not at all, against the register as it stands under its lock. Not written: a file
 * with a problem, one that changes nothing, and one whose register has moved on from the revision given, since
 * what was looked at then is no longer what would happen.
 */
export async function writeImport(
  store: Store,
  { plan, fileName, revision }: { plan: Plan; fileName: string; revision?: number | undefined },
  editing: Editing,
): Promise<ImportReport> {
  try {
    return await store.db.transaction(async (transaction) => {
      await lockRegister(transaction);
      const inside = within(store, transaction);
      const before = (await readRegisterRevision(inside)) - 1;
      const planned = plan(await readRegister(inside));
      const { kind, problems, changes } = planned;
      const isMoved = revision !== undefined && revision !== before;
      if (kind === null || problems.length > 0 || changes.length === 0 || isMoved)
        throw new NothingWritten(reportOf(planned, { revision: before }));
      const batch = await insertBatch(transaction, { kind, fileName, rows: planned.rows }, editing);
      await makeChanges(inside, transaction, { changes, batch, editing });
      return reportOf(planned, { revision: before + 1, batch });
    });
  } catch (error) {
    if (error instanceof NothingWritten) return error.report;
    if (error instanceof Refused) return refusedReport(store, plan, error);
    throw error;
  }
}

/** Imports that were written, newest first. */
export async function readImportBatches(store: Store, most: number): Promise<ImportBatch[]> {
  return store.db.select().from(importBatch).orderBy(desc(importBatch.id)).limit(most);
}

export async function readImportBatch(store: Store, id: number): Promise<ImportBatch | undefined> {
  const [row] = await store.db.select().from(importBatch).where(eq(importBatch.id, id));
  return row;
}

function reportOf(
  { kind, rows, problems }: PlannedImport,
  { revision, batch }: { revision: number; batch?: number },
): ImportReport {
  const written = batch !== undefined;
  return { kind, written, batch: batch ?? null, revision, rows: [...rows], problems: [...problems] };
}

/** The store's own rules saw what the plan did not: the file is not written, and says why. */
async function refusedReport(store: Store, plan: Plan, error: Refused): Promise<ImportReport> {
  const report = await dryImport(store, plan);
  return { ...report, problems: [...report.problems, { row: 0, field: '', problem: error.refusal.problem }] };
}

async function insertBatch(
  transaction: Transaction,
  { kind, fileName, rows }: { kind: ImportKind; fileName: string; rows: readonly ImportRow[] },
  { by, nowMs }: Editing,
): Promise<number> {
  const count = (outcome: ImportRow['outcome']) => rows.filter((row) => row.outcome === outcome).length;
  const [{ insertId }] = await transaction.insert(importBatch).values({
    importedAt: new Date(nowMs),
    importedBy: by.name,
    ...{ kind, fileName: fileName.slice(0, FILE_NAME_LENGTH) },
    ...{ addedCount: count('added'), changedCount: count('changed'), leftCount: count('left') },
  });
  return insertId;
}

const FILE_NAME_LENGTH = 120;

/** Every change has the same entry in the audit trail as one made by hand, with the import that it came from. */
async function makeChanges(
  inside: Store,
  transaction: Transaction,
  { changes, batch, editing }: { changes: readonly PlannedChange[]; batch: number; editing: Editing },
): Promise<void> {
  const at = new Date(editing.nowMs);
  for (const planned of changes) {
    const note = await changeOf(planned, editing)(transaction);
    if (note === undefined) continue;
    const detail = { ...note.detail, importBatch: batch };
    await insertAuditEntry(inside, { at, person: editing.by, ...note, detail });
  }
}

function changeOf(planned: PlannedChange, editing: Editing): Change {
  switch (planned.kind) {
    case 'new line':
      return lineAddition(planned.entry, editing);
    case 'line':
      return lineChange(planned.key, planned.patch);
    case 'new terminal':
      return terminalAddition(planned.key, planned.entry);
    case 'terminal':
      return terminalChange(planned, planned.patch);
    case 'settings':
      return settingsRecording(planned.key, planned.version, editing);
  }
}
