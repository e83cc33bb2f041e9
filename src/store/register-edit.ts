import type { LinePatch, NewLine, NewSettingsVersion, NewTerminal } from '../contract/register';
import type { Store } from './client';
import { lineAddition, lineChange, settingsRecording } from './line-changes';
import { changeRegister } from './register-change';
import type { Editing, RegisterEdit } from './register-change';
import { terminalAddition, terminalChange, terminalRemoval, type TerminalPatch } from './terminal-changes';

/** Adds a line with its terminals, in the order given, and its settings versions. */
export async function insertLine(store: Store, entry: NewLine, editing: Editing): Promise<RegisterEdit> {
  return changeRegister(store, { key: entry.key, ...editing }, lineAddition(entry, editing));
}

/** Changes facts of a line; what the patch leaves out stays. */
export async function patchLine(
  store: Store,
  { key, patch }: { key: string; patch: LinePatch },
  editing: Editing,
): Promise<RegisterEdit> {
  return changeRegister(store, { key, ...editing }, lineChange(key, patch));
}

/** Adds a terminal after those that the line has. */
export async function insertTerminal(
  store: Store,
  { key, entry }: { key: string; entry: NewTerminal },
  editing: Editing,
): Promise<RegisterEdit> {
  return changeRegister(store, { key, ...editing }, terminalAddition(key, entry));
}

/**
 * Changes a terminal. A name given for the substation that it already belongs to renames that substation
 * wherever it stands in the register.
 */
export async function patchTerminal(
  store: Store,
  { patch, ...named }: { key: string; terminalKey: string; patch: TerminalPatch },
  editing: Editing,
): Promise<RegisterEdit> {
  return changeRegister(store, { key: named.key, ...editing }, terminalChange(named, patch));
}

/** Removes a terminal that has never been heard; one that has belongs to the line's history. */
export async function removeTerminal(
  store: Store,
  named: { key: string; terminalKey: string },
  editing: Editing,
): Promise<RegisterEdit> {
  return changeRegister(store, { key: named.key, ...editing }, terminalRemoval(named));
}

/** Records a version of a line's settings: a copy for comparison, in force from its instant until the next one's. */
export async function insertSettingsVersion(
  store: Store,
  { key, version }: { key: string; version: NewSettingsVersion },
  editing: Editing,
): Promise<RegisterEdit> {
  return changeRegister(store, { key, ...editing }, settingsRecording(key, version, editing));
}
