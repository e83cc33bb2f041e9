import type { MarginSort } from './standing';

/**
 * Where a page of the fleet begins: behind this row, which was sorted by this figure. A number of rows to pass over
 * would not do: findings are renewed while somebody reads, and every row that moves would shift all the others.
 */
export interface MarginPlace {
  /** as the order has it: null for a row without the figure */
  readonly value: number | string | null;
  readonly line: string;
  readonly phase: 'a' | 'b' | 'c';
}

export const MARGIN_PLACE = /^(?<value>.*)~(?<line>[a-z0-9-]{1,40})~(?<phase>[abc])$/;
const DAY = /^\d{4}-\d{2}-\d{2}$/;

export const marginPlaceText = ({ value, line, phase }: MarginPlace): string =>
  `${value ?? ''}~${line}~${phase}`;

/** Undefined for what `marginPlaceText` can't have said of a row in this order. */
export function parseMarginPlace(text: string, sort: MarginSort): MarginPlace | undefined {
  const found = MARGIN_PLACE.exec(text)?.groups;
  if (found === undefined) return undefined;
  const value = placeValue(found['value']!, sort);
  if (value === undefined) return undefined;
  return { value, line: found['line']!, phase: found['phase'] as MarginPlace['phase'] };
}

const VALUES: Readonly<Record<MarginSort, 'number' | 'day' | 'words'>> = {
  shareOfPickup: 'number',
  levelAmps: 'number',
  expectedAmps: 'number',
  utilisation: 'number',
  utilisationP95: 'number',
  emergencyUtilisation: 'number',
  creepAmpsPerMonth: 'number',
  nearLikely: 'day',
  chargingAmps: 'number',
  mismatchAmps: 'number',
  restAmps: 'number',
  lineName: 'words',
  owner: 'words',
};

function placeValue(text: string, sort: MarginSort): MarginPlace['value'] | undefined {
  if (text === '') return null;
  switch (VALUES[sort]) {
    case 'words':
      return text;
    case 'day':
      return DAY.test(text) && !Number.isNaN(Date.parse(text)) ? text : undefined;
    case 'number':
      return Number.isFinite(Number(text)) ? Number(text) : undefined;
  }
}
