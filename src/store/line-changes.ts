import { and, eq } from 'drizzle-orm';
import type { LinePatch, NewLine, NewSettingsVersion } from '../contract/register';
import { refuse, refuseField, type Change, type Editing } from './register-change';
import { insertSettingsRow, insertTerminalRow, knownLine, lineByKey, terminalsOf } from './register-rows';
import {
  changedFields,
  newLineProblems,
  SEVENTH_TERMINAL,
  settingsProblems,
  TERMINALS_MOST,
  transformerProblems,
} from './register-rules';
import { line, settingRecord } from './schema/register';

/** Changes of a line's own entry, each to be run within a transaction: alone from a form, or many from a file. */

export function lineAddition(entry: NewLine, editing: Editing): Change {
  return async (transaction) => {
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
  };
}

/** What the patch leaves out stays. */
export function lineChange(key: string, patch: LinePatch): Change {
  return async (transaction) => {
    const before = await knownLine(transaction, key);
    // The contract can only compare the two ratings when both are in the patch
    if ((patch.emergencyRatingAmps ?? before.emergencyRatingAmps) < (patch.ratingAmps ?? before.ratingAmps))
      refuseField('not allowed', 'emergencyRatingAmps', 'The emergency rating is at least the rating.');
    if (patch.inZoneTransformer !== undefined) {
      const keys = (await terminalsOf(transaction, before.id)).map((one) => one.key);
      const problems = transformerProblems(patch.inZoneTransformer, keys);
      if (problems.length > 0) refuse('not allowed', problems[0]!.problem, problems);
    }
    const changed = changedFields(before, patch);
    if (changed === undefined) return undefined;
    await transaction.update(line).set(changed.after).where(eq(line.id, before.id));
    return { action: 'line changed', subject: key, detail: changed };
  };
}

export function settingsRecording(key: string, version: NewSettingsVersion, editing: Editing): Change {
  return async (transaction) => {
    const { id: lineId, capacitanceNfPerKm } = await knownLine(transaction, key);
    const terminals = (await terminalsOf(transaction, lineId)).map((one) => one.key);
    const problems = settingsProblems(version, { terminals, capacitanceNfPerKm });
    if (problems.length > 0)
      refuse('not allowed', 'This line’s scheme cannot have these settings.', problems);
    const [same] = await transaction
      .select({ id: settingRecord.id })
      .from(settingRecord)
      .where(and(eq(settingRecord.lineId, lineId), eq(settingRecord.validFrom, new Date(version.validFrom))));
    if (same !== undefined)
      refuseField('taken', 'validFrom', 'This line already has settings that are valid from this instant.');
    await insertSettingsRow(transaction, version, { lineId, ...editing });
    return { action: 'settings recorded', subject: key, detail: { ...version } };
  };
}
