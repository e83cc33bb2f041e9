import type { MarginRow, MarginSort } from '../contract/standing';
import { ampsText, dateText, NOT_COMPUTABLE, percentOfMarkText, percentText } from './figures';
import type { CsvCell } from './line-csv';

/** Columns of the fleet's list beside the line itself, in the order in which they stand. */
export const MARGIN_COLUMNS = [
  'owner',
  'share',
  'level',
  'expected',
  'now',
  'p95',
  'emergency',
  'charging',
  'mismatch',
  'rest',
  'creep',
  'forecast',
] as const;
export type MarginColumn = (typeof MARGIN_COLUMNS)[number];
export type MarginFigure = Exclude<MarginColumn, 'owner'>;

export const isMarginFigure = (column: MarginColumn): column is MarginFigure => column !== 'owner';

/** Shown unless others are chosen: the owner says nothing of a margin, and the figures need the width. */
export const USUAL_COLUMNS: readonly MarginColumn[] = MARGIN_COLUMNS.filter(isMarginFigure);

export const areUsual = (columns: readonly MarginColumn[]): boolean =>
  columns.join() === USUAL_COLUMNS.join();

export interface MarginColumnFacts {
  /** the name in full, for the saved file, the choices and a narrow screen */
  readonly name: string;
  /** what stands at the column's head, under its group's name where it has one */
  readonly head: string;
  readonly group?: 'utilisation' | 'composition';
  /** what the column says, in full */
  readonly meaning: string;
  readonly sort: MarginSort;
}

export interface MarginFigureFacts extends MarginColumnFacts {
  readonly unit: string;
  /** the figure in the saved file: amperes, per cent, a day */
  readonly saved: (row: MarginRow) => CsvCell;
}

const tenth = (value: number | null): CsvCell => (value === null ? null : Math.round(value * 10) / 10);
const perCent = (ratio: number | null): CsvCell => (ratio === null ? null : Math.round(ratio * 1000) / 10);

export const MARGIN_FIGURE: Readonly<Record<MarginFigure, MarginFigureFacts>> = {
  share: {
    name: 'share of pickup',
    head: 'share of pickup',
    meaning: '24-hour standing level as a share of the recorded pickup',
    sort: 'shareOfPickup',
    unit: '%',
    saved: (row) => perCent(row.shareOfPickup),
  },
  level: {
    name: 'standing level',
    head: 'measured',
    meaning: '24-hour standing level',
    sort: 'levelAmps',
    unit: 'A',
    saved: (row) => tenth(row.levelAmps),
  },
  expected: {
    name: 'expected level',
    head: 'expected',
    meaning: 'What line constants, transformer classes and channel let expect',
    sort: 'expectedAmps',
    unit: 'A',
    saved: (row) => tenth(row.expectedAmps),
  },
  now: {
    name: 'utilisation now',
    head: 'now',
    group: 'utilisation',
    meaning: 'Differential over threshold at the present restraint',
    sort: 'utilisation',
    unit: '%',
    saved: (row) => perCent(row.utilisation),
  },
  p95: {
    name: 'utilisation, 95th percentile',
    head: '95th',
    group: 'utilisation',
    meaning: 'The 95th percentile of utilisation: passed for one twentieth of the time',
    sort: 'utilisationP95',
    unit: '%',
    saved: (row) => perCent(row.utilisationP95),
  },
  emergency: {
    name: 'utilisation at emergency rating',
    head: 'emergency',
    group: 'utilisation',
    meaning: 'Utilisation at emergency rating, worst power factor, from the composition',
    sort: 'emergencyUtilisation',
    unit: '%',
    saved: (row) => perCent(row.emergencyUtilisation),
  },
  charging: {
    name: 'charging',
    head: 'charging',
    group: 'composition',
    meaning: 'The part of the standing level that follows the voltage',
    sort: 'chargingAmps',
    unit: 'A',
    saved: (row) => tenth(row.chargingAmps),
  },
  mismatch: {
    name: 'mismatch',
    head: 'mismatch',
    group: 'composition',
    meaning: 'The part that follows the load: ratio and angle mismatch together',
    sort: 'mismatchAmps',
    unit: 'A',
    saved: (row) => tenth(row.mismatchAmps),
  },
  rest: {
    name: 'rest',
    head: 'rest',
    group: 'composition',
    meaning: 'The part that follows neither voltage nor load',
    sort: 'restAmps',
    unit: 'A',
    saved: (row) => tenth(row.restAmps),
  },
  creep: {
    name: 'change a month',
    head: 'a month',
    meaning: 'Significant rise of the standing level a month',
    sort: 'creepAmpsPerMonth',
    unit: 'A',
    saved: (row) => (row.creepAmpsPerMonth === null ? null : Math.round(row.creepAmpsPerMonth * 100) / 100),
  },
  forecast: {
    name: 'near mark, likely',
    head: 'near mark',
    meaning: 'Likely day on which the standing level reaches the near mark',
    sort: 'nearLikely',
    unit: 'day',
    saved: (row) => row.near?.likely ?? null,
  },
};

export const MARGIN_COLUMN: Readonly<Record<MarginColumn, MarginColumnFacts>> = {
  owner: {
    name: 'owner',
    head: 'owner',
    meaning: 'Who owns the line and answers for its protection',
    sort: 'owner',
  },
  ...MARGIN_FIGURE,
};

/** The columns of an address; the usual ones when it names none that there is. */
export function marginColumnsOf(asked: string | null): readonly MarginColumn[] {
  const named = (asked ?? '').split(',');
  const chosen = MARGIN_COLUMNS.filter((column) => named.includes(column));
  return chosen.length === 0 ? USUAL_COLUMNS : chosen;
}

/** A dash on the screen where there is no figure: the row has many, and the head says what is missing. */
const orDash = (text: string): string => (text === NOT_COMPUTABLE ? '–' : text);

/** Per cent that rounds across neither the near mark nor the threshold or pickup. */
const markedText = (ratio: number | null, nearRatio: number): string =>
  orDash(percentOfMarkText(ratio, ratio !== null && ratio < nearRatio ? nearRatio : 1));

/** A row's figures as they stand in the list. */
export function marginText(row: MarginRow, column: MarginFigure, nearRatio: number): string {
  switch (column) {
    case 'share':
      return markedText(row.shareOfPickup, nearRatio);
    case 'level':
      return orDash(ampsText(row.levelAmps));
    case 'expected':
      return orDash(ampsText(row.expectedAmps));
    case 'now':
      return markedText(row.utilisation, nearRatio);
    case 'p95':
      return markedText(row.utilisationP95, nearRatio);
    case 'emergency':
      return orDash(percentOfMarkText(row.emergencyUtilisation));
    case 'charging':
      return orDash(ampsText(row.chargingAmps));
    case 'mismatch':
      return orDash(ampsText(row.mismatchAmps));
    case 'rest':
      return orDash(ampsText(row.restAmps));
    case 'creep':
      return creepText(row);
    case 'forecast':
      return forecastText(row, nearRatio);
  }
}

function creepText({ creepAmpsPerMonth }: MarginRow): string {
  if (creepAmpsPerMonth === null) return '–';
  return `${creepAmpsPerMonth >= 0 ? '+' : ''}${ampsText(creepAmpsPerMonth)}`;
}

/** "12 Feb 2027", "passed"; what rises and does not get there within five years says so. */
function forecastText({ near, creepVerdict, shareOfPickup }: MarginRow, nearRatio: number): string {
  if (shareOfPickup !== null && shareOfPickup >= nearRatio) return 'passed';
  if (near !== null && near.likely !== null) return dateText(`${near.likely}T12:00:00Z`, 'UTC');
  return creepVerdict === null ? '–' : 'beyond 5 years';
}

/** What a strip of one phase says to whoever does not see it. */
export const shareWords = (shareOfPickup: number | null, nearRatio: number): string =>
  shareOfPickup === null
    ? 'The standing level or the pickup is not known.'
    : `${percentOfMarkText(shareOfPickup)} of the pickup; near mark at ${percentText(nearRatio)}.`;
