import { eq } from 'drizzle-orm';
import type { z } from 'zod';
import type { NewTerminal, terminalPatchSchema } from '../contract/register';
import { refuse, refuseField, type Change, type Transaction } from './register-change';
import { insertTerminalRow, knownLine, knownTerminal, terminalsOf } from './register-rows';
import { changedFields, SEVENTH_TERMINAL, TERMINALS_MOST } from './register-rules';
import { terminalState } from './schema/feed';
import { terminal } from './schema/register';
import { ensureSubstation, renameSubstation, substationName } from './substation-edit';

/** Changes of a line's terminals, each to be run within a transaction: alone from a form, or many from a file. */

export type TerminalPatch = z.infer<typeof terminalPatchSchema>;

export function terminalAddition(key: string, entry: NewTerminal): Change {
  return async (transaction) => {
    const { id: lineId } = await knownLine(transaction, key);
    const present = await terminalsOf(transaction, lineId);
    if (present.some((other) => other.key === entry.key))
      refuseField('taken', 'key', `This line already has a terminal with the key "${entry.key}".`);
    if (present.length >= TERMINALS_MOST) refuse('not allowed', SEVENTH_TERMINAL);
    await insertTerminalRow(transaction, entry, { lineId, position: present.length, fieldPrefix: '' });
    return { action: 'terminal added', subject: `${key}/${entry.key}`, detail: { ...entry } };
  };
}

/**
 * A name given for the substation that the terminal already belongs to renames that substation wherever it stands
 * in the register.
 */
export function terminalChange(
  { key, terminalKey }: { key: string; terminalKey: string },
  patch: TerminalPatch,
): Change {
  return async (transaction) => {
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
  };
}

/** Only a terminal that has never been heard goes; one that has belongs to the line's history. */
export function terminalRemoval({ key, terminalKey }: { key: string; terminalKey: string }): Change {
  return async (transaction) => {
    const { id: lineId, ...facts } = await knownLine(transaction, key);
    const { id, ...removed } = await knownTerminal(transaction, { id: lineId, ...facts }, terminalKey);
    const [state] = await transaction.select().from(terminalState).where(eq(terminalState.terminalId, id));
    if (state !== undefined && state.heardAt !== null)
      refuse(
        'taken',
        `The terminal "${terminalKey}" has been heard, so the line's history needs it. Take it out of service instead.`,
      );
    if (facts.inZoneTransformer?.otherTerminals.includes(terminalKey))
      refuse(
        'not allowed',
        `The terminal "${terminalKey}" stands behind the line’s transformer. Take it from there first.`,
      );
    await transaction.delete(terminal).where(eq(terminal.id, id));
    for (const [position, other] of (await terminalsOf(transaction, lineId)).entries())
      await transaction.update(terminal).set({ position }).where(eq(terminal.id, other.id));
    return { action: 'terminal removed', subject: `${key}/${terminalKey}`, detail: removed };
  };
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
