import type { ReplaySettings } from '../contract/replay';
import type { CharacteristicOnWire, RestraintOnWire } from '../contract/settings-version';
import { RESTRAINT_KINDS } from '../protection/scheme';
import { replayFields, ratioFields } from './replay-fields';
import { replayProblems, type ReplayLine } from './replay-problems';

/** The form of a replay as it is typed: per cent for ratios, names as the fields of the settings. */
export type ReplayTyped = Readonly<Record<string, string>>;
export type CharacteristicKind = CharacteristicOnWire['kind'];

export interface FromTyped {
  /** undefined while a figure is missing */
  readonly settings: ReplaySettings | undefined;
  /** sentences by the name of the field */
  readonly problems: Readonly<Record<string, string>>;
}

/** As it was typed: a division by a hundred leaves dust in the last digit. */
const ratioOf = (percent: number): number => Number((percent / 100).toPrecision(12));
const plain = (value: number): string => String(Number(value.toPrecision(10)));

/** Settings as the form shows them. Fields of the other kinds start empty: no figure is suggested. */
export function typedSettings(settings: ReplaySettings | undefined, line: ReplayLine): ReplayTyped {
  const typed: Record<string, string> = {
    kind: settings?.characteristic.kind ?? 'two-slope',
    slopeStart: 'from-zero',
    restraintKind: 'scaled-sum',
    factor: '0.5',
    chargingCompensation: settings?.chargingCompensation === true ? 'yes' : '',
  };
  if (settings === undefined) return typed;
  const { characteristic, restraint } = settings;
  if (restraint.kind === 'scaled-sum' || restraint.kind === 'maximum') typed.restraintKind = restraint.kind;
  if (restraint.kind === 'scaled-sum') typed.factor = plain(restraint.factor);
  for (const { name } of replayFields(characteristic.kind, line)) {
    const value = valueAt(characteristic, name, line);
    if (value !== undefined) typed[name] = plain(ratioFields.has(lastPart(name)) ? 100 * value : value);
  }
  if (characteristic.kind === 'two-slope') typed.slopeStart = characteristic.slopeStart;
  return typed;
}

/** What the form means, or what is missing or impossible in it, each beside its field. */
export function settingsFromTyped(typed: ReplayTyped, line: ReplayLine): FromTyped {
  const kind = typed.kind as CharacteristicKind;
  const problems: Record<string, string> = {};
  const figures: Record<string, number> = {};
  for (const { name, missing } of replayFields(kind, line)) {
    const value = figureOf(typed[name]);
    if (value === undefined) problems[name] = `Give ${missing}.`;
    else figures[name] = ratioFields.has(lastPart(name)) ? ratioOf(value) : value;
  }
  const factor = figureOf(typed.factor);
  if (kind === 'two-slope' && typed.restraintKind === 'scaled-sum' && factor === undefined)
    problems.factor = 'Give the factor; one half is common practice.';
  if (Object.keys(problems).length > 0) return { settings: undefined, problems };
  const settings: ReplaySettings = {
    characteristic: characteristicOf(kind, { typed, figures, line }),
    restraint: restraintOf(kind, typed, factor ?? 0),
    chargingCompensation: typed.chargingCompensation === 'yes',
  };
  return { settings, problems: problemsByField(replayProblems(settings, line)) };
}

/** Problems of the settings' own paths by the form's field names; the first of each. */
export function problemsByField(
  found: readonly { readonly field: string; readonly problem: string }[],
): Record<string, string> {
  const byField: Record<string, string> = {};
  for (const { field, problem } of found) {
    const path = field.replace(/^settings\./, '');
    const name =
      path === 'restraint.kind' ? 'restraintKind' : path.replace(/^(characteristic|restraint)\./, '');
    byField[name] ??= inPercent(lastPart(name), problem);
  }
  return byField;
}

/** The form speaks per cent where the settings are ratios. */
function inPercent(field: string, problem: string): string {
  if (!/\bratio from 0 to\b/.test(problem)) return problem;
  const most = field.startsWith('slope') ? 200 : 100;
  return `${field.startsWith('slope') ? 'A slope' : 'An error'} is 0 to ${most} %.`;
}

function figureOf(text: string | undefined): number | undefined {
  const value = text?.trim() ? Number(text.trim().replace(',', '.')) : NaN;
  return Number.isFinite(value) ? value : undefined;
}

const lastPart = (name: string): string => name.split('.').at(-1) ?? name;

function valueAt(characteristic: CharacteristicOnWire, name: string, line: ReplayLine): number | undefined {
  const [list, index, field] = name.split('.');
  if (characteristic.kind === 'adaptive' && list === 'ctErrors') {
    const key = line.terminals[Number(index)]?.key;
    const allowance = characteristic.ctErrors.find(({ terminal }) => terminal === key);
    return allowance?.[field as 'errorBelow' | 'errorAbove' | 'limitAmps'];
  }
  return (characteristic as unknown as Record<string, number>)[name];
}

function characteristicOf(
  kind: CharacteristicKind,
  { typed, figures, line }: { typed: ReplayTyped; figures: Record<string, number>; line: ReplayLine },
): CharacteristicOnWire {
  const of = (name: string): number => figures[name]!;
  switch (kind) {
    case 'two-slope':
      return {
        kind,
        pickupAmps: of('pickupAmps'),
        slope1: of('slope1'),
        kneeAmps: of('kneeAmps'),
        slope2: of('slope2'),
        slopeStart: typed.slopeStart === 'from-pickup' ? 'from-pickup' : 'from-zero',
      };
    case 'adaptive':
      return {
        kind,
        pickupAmps: of('pickupAmps'),
        timeErrorMs: of('timeErrorMs'),
        ctErrors: line.terminals.map(({ key }, index) => ({
          terminal: key,
          errorBelow: of(`ctErrors.${index}.errorBelow`),
          errorAbove: of(`ctErrors.${index}.errorAbove`),
          limitAmps: of(`ctErrors.${index}.limitAmps`),
        })),
      };
    case 'alpha-plane':
      return { kind, pickupAmps: of('pickupAmps'), radius: of('radius'), angleDeg: of('angleDeg') };
    case 'phase-comparison':
      return { kind, toleranceDeg: of('toleranceDeg'), releaseAmps: of('releaseAmps') };
  }
}

function restraintOf(kind: CharacteristicKind, typed: ReplayTyped, factor: number): RestraintOnWire {
  if (kind === 'two-slope')
    return typed.restraintKind === 'maximum' ? { kind: 'maximum' } : { kind: 'scaled-sum', factor };
  // every other kind goes with one restraint alone
  return RESTRAINT_KINDS[kind][0] === 'error-sum' ? { kind: 'error-sum' } : { kind: 'none' };
}
