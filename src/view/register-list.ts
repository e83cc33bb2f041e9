import type { RegisterLine } from '../contract/register';
import type { SettingsVersion } from '../contract/settings-version';
import { ampsText, dateText, kilovoltsText } from './figures';
import { goesByText, lengthAndKindText } from './register-words';

export const REGISTER_SORTS = [
  'name',
  'voltage',
  'length',
  'rating',
  'terminals',
  'owner',
  'settings',
] as const;
export type RegisterSort = (typeof REGISTER_SORTS)[number];

/** What of the register a list shows: its state, as the address keeps it. */
export interface RegisterListState {
  readonly search: string;
  readonly sort: RegisterSort;
  readonly descending: boolean;
  /** only lines that have no settings in force */
  readonly withoutSettings: boolean;
}

export interface RegisterRow {
  readonly key: string;
  readonly name: string;
  readonly voltage: string;
  readonly lengthAndKind: string;
  readonly rating: string;
  readonly terminals: readonly { readonly key: string; readonly name: string; readonly inService: boolean }[];
  /** undefined when not recorded */
  readonly owner: string | undefined;
  readonly goesBy: string;
  readonly inService: boolean;
  /** "since 12 May 2025", or undefined when nothing is in force and the line is not evaluated */
  readonly settings: string | undefined;
  readonly hasTransformer: boolean;
}

/** A line beside the settings that are in force now. */
export interface ListedLine {
  readonly line: RegisterLine;
  readonly inForce: SettingsVersion | undefined;
}

export function registerListState(parameters: URLSearchParams): RegisterListState {
  const asked = parameters.get('sort') ?? 'name';
  const descending = asked.startsWith('-');
  return {
    search: parameters.get('q')?.trim() ?? '',
    sort: REGISTER_SORTS.find((sort) => sort === asked.replace(/^-/, '')) ?? 'name',
    descending,
    withoutSettings: parameters.get('settings') === 'none',
  };
}

/** The address of the list in another state; what is as usual stays out of it. */
export function registerListAddress(
  state: RegisterListState,
  change: Partial<RegisterListState> = {},
): string {
  const { search, sort, descending, withoutSettings } = { ...state, ...change };
  const parameters = new URLSearchParams();
  if (search !== '') parameters.set('q', search);
  if (sort !== 'name' || descending) parameters.set('sort', `${descending ? '-' : ''}${sort}`);
  if (withoutSettings) parameters.set('settings', 'none');
  const query = parameters.toString();
  return query === '' ? '/register' : `/register?${query}`;
}

/** The lines that a state asks for, in its order. A search looks at names, keys, substations, owners, voltage and kind. */
export function registerRows(
  lines: readonly ListedLine[],
  state: RegisterListState,
  timeZone: string,
): RegisterRow[] {
  const words = state.search.toLowerCase().split(/\s+/).filter(Boolean);
  const direction = state.descending ? -1 : 1;
  return lines
    .filter(({ inForce }) => !state.withoutSettings || inForce === undefined)
    .filter((listed) => words.every((word) => searchedText(listed).includes(word)))
    .sort((one, other) => direction * compared(one, other, state.sort) || byName(one, other))
    .map((listed) => row(listed, timeZone));
}

function searchedText({ line }: ListedLine): string {
  const substations = line.terminals.map(
    ({ substation, substationName }) => `${substation} ${substationName}`,
  );
  const voltage = [`${line.voltageKv} kV`, `${line.voltageKv}kV`];
  return [line.name, line.key, ...substations, line.owner ?? '', ...voltage, line.kind]
    .join(' ')
    .toLowerCase();
}

const byName = (one: ListedLine, other: ListedLine): number =>
  one.line.name.localeCompare(other.line.name, 'en');

function compared(one: ListedLine, other: ListedLine, sort: RegisterSort): number {
  const by = (value: (listed: ListedLine) => number) => value(one) - value(other);
  switch (sort) {
    case 'name':
      return byName(one, other);
    case 'voltage':
      return by(({ line }) => line.voltageKv);
    case 'length':
      return by(({ line }) => line.lengthKm);
    case 'rating':
      return by(({ line }) => line.ratingAmps);
    case 'terminals':
      return by(({ line }) => line.terminals.length);
    case 'owner':
      // As with settings, what is not recorded comes first
      return (one.line.owner ?? '').localeCompare(other.line.owner ?? '', 'en', { numeric: true });
    case 'settings':
      // A line without settings comes first: it is what somebody must see to
      return by(({ inForce }) => (inForce === undefined ? 0 : Date.parse(inForce.validFrom)));
  }
}

function row({ line, inForce }: ListedLine, timeZone: string): RegisterRow {
  return {
    key: line.key,
    name: line.name,
    voltage: kilovoltsText(line.voltageKv),
    lengthAndKind: lengthAndKindText(line),
    rating: ampsText(line.ratingAmps),
    terminals: line.terminals.map(({ key, substationName, inService }) => ({
      key,
      name: substationName,
      inService,
    })),
    owner: line.owner ?? undefined,
    goesBy: goesByText(line.goesBy),
    inService: line.inService,
    hasTransformer: line.inZoneTransformer !== null,
    settings: inForce === undefined ? undefined : `since ${dateText(inForce.validFrom, timeZone)}`,
  };
}

/** How the register stands, as the page's first sentence says it. */
export function registerCounts(lines: readonly ListedLine[]): {
  registered: string;
  withoutSettings: string | undefined;
} {
  const without = lines.filter(({ inForce }) => inForce === undefined).length;
  return {
    registered:
      lines.length === 1 ? 'One line is registered' : `${lines.length || 'No'} lines are registered`,
    withoutSettings:
      without === 0
        ? undefined
        : without === 1
          ? 'One has no settings in force'
          : `${without} have no settings in force`,
  };
}
