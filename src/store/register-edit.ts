import { and, asc, eq } from 'drizzle-orm';
import type { z } from 'zod';
import type {
  LinePatch,
  NewLine,
  NewSettingsVersion,
  NewTerminal,
  terminalPatchSchema,
} from '../contract/register';
import type { Store } from './client';
import { changeRegister, refuse, refuseField } from './register-change';
import type { Editing, RegisterEdit, Transaction } from './register-change';
import {
  changedFields,
  newLineProblems,
  SEVENTH_TERMINAL,
  settingsProblems,
  TERMINALS_MOST,
} from './register-rules';
import { terminalState } from './schema/feed';
import { line, settingRecord, terminal } from './schema/register';
import { ensureSubstation, renameSubstation, substationName } from './substation-edit';

export type TerminalPatch = z.infer<typeof terminalPatchSchema>;
type LineRow = typeof line.$inferSelect;
type TerminalRow = typeof terminal.$inferSelect;

/** Adds a line with its terminals, in the order given, and its settings versions. */
export async function insertLine(store: Store, entry: NewLine, editing: Editing): Promise<RegisterEdit> {
  return changeRegister(store, { key: entry.key, ...editing }, async (transaction) => {
    const problems = newLineProblems(entry);
    if (problems.length > 0) refuse('not allowed', 'The line cannot be added as it stands.', problems);
    if (entry.terminals.length > TERMINALS_MOST) refuseField('not allowed', 'terminals', SEVENTH_TERMINAL);
    if ((await lineByKey(transaction, entry.key)) !== undefined)
      refuseField('taken', 'key', `The register already has a line with the key "${entry.key}".`);
    const { terminals, settings, ...facts } = entry;
    const [{ insertId: lineId }] = await transaction.insert(line).values(facts);
    for (const [position, one] of terminals.entries())
      await insertTerminalRow(transaction, one, { lineId, position, fieldPrefix: `terminals.${position}.` });
    for (const version of settings) await insertSettingsRow(transaction, version, { lineId, ...editing });
    return { action: 'line added', subject: entry.key, detail: { ...entry } };
  });
}

/** Changes facts of a line; what the patch leaves out stays. */
export async function patchLine(
  store: Store,
  { key, patch }: { key: string; patch: LinePatch },
  editing: Editing,
): Promise<RegisterEdit> {
  return changeRegister(store, { key, ...editing }, async (transaction) => {
    const before = await knownLine(transaction, key);
    // The contract can only compare the two ratings when both are in the patch
    if ((patch.emergencyRatingAmps ?? before.emergencyRatingAmps) < (patch.ratingAmps ?? before.ratingAmps))
      refuseField('not allowed', 'emergencyRatingAmps', 'The emergency rating is at least the rating.');
    const changed = changedFields(before, patch);
    if (changed === undefined) return undefined;
    await transaction.update(line).set(changed.after).where(eq(line.id, before.id));
    return { action: 'line changed', subject: key, detail: changed };
  });
}

/** Adds a terminal after those that the line has. */
export async function insertTerminal(
  store: Store,
  { key, entry }: { key: string; entry: NewTerminal },
  editing: Editing,
): Promise<RegisterEdit> {
  return changeRegister(store, { key, ...editing }, async (transaction) => {
    const { id: lineId } = await knownLine(transaction, key);
    const present = await terminalsOf(transaction, lineId);
    if (present.some((other) => other.key === entry.key))
      refuseField('taken', 'key', `This line already has a terminal with the key "${entry.key}".`);
    if (present.length >= TERMINALS_MOST) refuse('not allowed', SEVENTH_TERMINAL);
    await insertTerminalRow(transaction, entry, { lineId, position: present.length, fieldPrefix: '' });
    return { action: 'terminal added', subject: `${key}/${entry.key}`, detail: { ...entry } };
  });
}

/**
 * Changes a terminal. A name given for the substation that it already belongs to renames that substation
 * wherever it stands in the register.
 */
export async function patchTerminal(
  store: Store,
  { key, terminalKey, patch }: { key: string; terminalKey: string; patch: TerminalPatch },
  editing: Editing,
): Promise<RegisterEdit> {
  return changeRegister(store, { key, ...editing }, async (transaction) => {
    const before = await knownTerminal(transaction, await knownLine(transaction, key), terminalKey);
    const beforeName = await substationName(transaction, before.substation);
    await settleSubstation(transaction, before.substation, patch);
    const { substationName: name, ...row } = patch;
    const changed = changedFields(
      { ...before, substationName: beforeName },
      { ...row, substationName: name },
    );
    if (changed === undefined) return undefined;
    // Drizzle refuses an update of no columns, which a mere renaming of the substation would be
    await transaction
      .update(terminal)
      .set({ position: before.position, ...row })
      .where(eq(terminal.id, before.id));
    return { action: 'terminal changed', subject: `${key}/${terminalKey}`, detail: changed };
  });
}

/** Removes a terminal that has never been heard; one that has belongs to the line's history. */
export async function removeTerminal(
  store: Store,
  { key, terminalKey }: { key: string; terminalKey: string },
  editing: Editing,
): Promise<RegisterEdit> {
  return changeRegister(store, { key, ...editing }, async (transaction) => {
    const { id: lineId, ...facts } = await knownLine(transaction, key);
    const { id, ...removed } = await knownTerminal(transaction, { id: lineId, ...facts }, terminalKey);
    const [state] = await transaction.select().from(terminalState).where(eq(terminalState.terminalId, id));
    if (state !== undefined && state.heardAt !== null)
      refuse(
        'taken',
        `The terminal "${terminalKey}" has been heard, so the line's history needs it. Take it out of service instead.`,
      );
    await transaction.delete(terminal).where(eq(terminal.id, id));
    for (const [position, other] of (await terminalsOf(transaction, lineId)).entries())
      await transaction.update(terminal).set({ position }).where(eq(terminal.id, other.id));
    return { action: 'terminal removed', subject: `${key}/${terminalKey}`, detail: removed };
  });
}

/** Records a version of a line's settings: a copy for comparison, in force from its instant until the next one's. */
export async function insertSettingsVersion(
  store: Store,
  { key, version }: { key: string; version: NewSettingsVersion },
  editing: Editing,
): Promise<RegisterEdit> {
  return changeRegister(store, { key, ...editing }, async (transaction) => {
    const { id: lineId } = await knownLine(transaction, key);
    const problems = settingsProblems(version);
    if (problems.length > 0) refuse('not allowed', 'No scheme can have these settings.', problems);
    const [same] = await transaction
      .select({ id: settingRecord.id })
      .from(settingRecord)
      .where(and(eq(settingRecord.lineId, lineId), eq(settingRecord.validFrom, new Date(version.validFrom))));
    if (same !== undefined)
      refuseField('taken', 'validFrom', 'This line already has settings that are valid from this instant.');
    await insertSettingsRow(transaction, version, { lineId, ...editing });
    return { action: 'settings recorded', subject: key, detail: { ...version } };
  });
}

async function lineByKey(transaction: Transaction, key: string): Promise<LineRow | undefined> {
  const [row] = await transaction.select().from(line).where(eq(line.key, key));
  return row;
}

async function knownLine(transaction: Transaction, key: string): Promise<LineRow> {
  return (
    (await lineByKey(transaction, key)) ??
    refuse('unknown', `The register has no line with the key "${key}".`)
  );
}

async function terminalsOf(transaction: Transaction, lineId: number): Promise<TerminalRow[]> {
  return transaction
    .select()
    .from(terminal)
    .where(eq(terminal.lineId, lineId))
    .orderBy(asc(terminal.position));
}

async function knownTerminal(transaction: Transaction, owner: LineRow, key: string): Promise<TerminalRow> {
  const found = (await terminalsOf(transaction, owner.id)).find((one) => one.key === key);
  return found ?? refuse('unknown', `The line "${owner.key}" has no terminal with the key "${key}".`);
}

async function insertTerminalRow(
  transaction: Transaction,
  { substationName: name, ...entry }: NewTerminal,
  { fieldPrefix, ...place }: { lineId: number; position: number; fieldPrefix: string },
): Promise<void> {
  await ensureSubstation(transaction, { key: entry.substation, name, fieldPrefix });
  await transaction.insert(terminal).values({ ...entry, ...place });
}

async function settleSubstation(
  transaction: Transaction,
  presentKey: string,
  patch: TerminalPatch,
): Promise<void> {
  const { substation: key = presentKey, substationName: name } = patch;
  if (key === presentKey) {
    if (name !== undefined) await renameSubstation(transaction, { key, name });
    return;
  }
  if (name !== undefined) return ensureSubstation(transaction, { key, name, fieldPrefix: '' });
  if ((await substationName(transaction, key)) === undefined)
    refuseField(
      'not allowed',
      'substationName',
      `The register has no substation "${key}" yet; give its name as well.`,
    );
}

async function insertSettingsRow(
  transaction: Transaction,
  { validFrom, characteristic, restraint, note }: NewSettingsVersion,
  { lineId, by, nowMs }: Editing & { lineId: number },
): Promise<void> {
  await transaction.insert(settingRecord).values({
    ...{ lineId, characteristic, restraint, note },
    validFrom: new Date(validFrom),
    recordedBy: by.name,
    recordedAt: new Date(nowMs),
  });
}
