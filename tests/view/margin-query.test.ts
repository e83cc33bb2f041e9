import { describe, expect, it } from 'vitest';
import { marginQuerySchema } from '../../src/contract/margins';
import { MARGIN_COLUMNS } from '../../src/view/margin-columns';
import { marginOrder } from '../../src/view/margin-order';
import {
  marginListParameters,
  marginQueryOf,
  marginSearch,
  parseMarginAddress,
  sortedBy,
  WHOLE_FLEET,
  type MarginAddress,
} from '../../src/view/margin-query';
import { marginSentence } from '../../src/view/margin-sentence';
import { quarterCircle, scatterPoints } from '../../src/view/margin-scatter';

const NARROWED: MarginAddress = {
  text: 'esk holm',
  substation: 'holm',
  voltageKv: 220,
  creep: 'within margin',
  owner: 'Pell Water & Sons',
  sort: 'nearLikely',
  descending: true,
  columns: ['level', 'forecast'],
  points: 'all',
};

describe('the address of the margins', () => {
  it('comes back as it was, and is empty for the whole fleet', () => {
    expect(parseMarginAddress(marginSearch(NARROWED))).toEqual(NARROWED);
    expect(marginSearch(WHOLE_FLEET)).toBe('');
    const owned: MarginAddress = {
      ...WHOLE_FLEET,
      sort: 'owner',
      descending: false,
      columns: MARGIN_COLUMNS,
    };
    expect(parseMarginAddress(marginSearch(owned))).toEqual(owned);
  });

  it('asks the endpoint for what the page asks the store', () => {
    const sent = marginQuerySchema.parse(Object.fromEntries(marginListParameters(NARROWED)));
    expect(sent).toEqual(marginQueryOf(NARROWED));
  });

  it('takes what it does not understand as not chosen', () => {
    const strange =
      '?sort=colour&descending=perhaps&voltage=-3&creep=x&owner=%20&substation=A%20B&columns=none&points=x';
    expect(parseMarginAddress(strange)).toEqual(WHOLE_FLEET);
  });

  it('shows the owner when that is chosen, and not otherwise', () => {
    expect(WHOLE_FLEET.columns).toEqual(MARGIN_COLUMNS.filter((column) => column !== 'owner'));
    expect(parseMarginAddress('?columns=level,owner').columns).toEqual(['owner', 'level']);
  });

  it('turns the order round when the same head is chosen again', () => {
    expect(sortedBy(WHOLE_FLEET, 'shareOfPickup').descending).toBe(false);
    expect(sortedBy(WHOLE_FLEET, 'nearLikely')).toMatchObject({ sort: 'nearLikely', descending: false });
    expect(sortedBy(WHOLE_FLEET, 'owner')).toMatchObject({ sort: 'owner', descending: false });
  });
});

it('an order puts rows without the figure last, whichever way it goes', () => {
  const rows = [3, null, 1, null, 2];
  expect(marginOrder(rows, (row) => row, true)).toEqual([3, 2, 1, null, null]);
  expect(marginOrder(rows, (row) => row, false)).toEqual([1, 2, 3, null, null]);
});

it('the sentence says what asks for something, and that nothing does', () => {
  expect(marginSentence({ phases: 72, beyond: 2, creeping: 1, withinMargin: 1 })).toEqual({
    whole: '72 standing levels',
    beyond: 'two beyond the near mark',
    creeping: 'one creeping towards it',
    rest: 'one rises within margin',
  });
  expect(marginSentence({ phases: 72, beyond: 0, creeping: 0, withinMargin: 0 }).rest).toBe(
    'none is beyond the near mark and none creeps towards it',
  );
});

describe('the scatter', () => {
  const scatter = {
    at: '2026-03-02T08:00:00.000Z',
    nearRatio: 0.7,
    lines: [
      ['one', 'One'],
      ['two', 'Two'],
    ] as [string, string][],
    points: [
      [0, 'a', 0.3, 0.4, 0.5],
      [0, 'b', 0.6, 0.1, 0.6],
      [1, 'c', 0.1, 0.1, null],
    ] as [number, 'a' | 'b' | 'c', number, number, number | null][],
  };

  it('shows of each line the phase that reaches furthest, or all', () => {
    expect(scatterPoints(scatter, 'worst').map(({ key, phase }) => key + phase)).toEqual(['oneb', 'twoc']);
    expect(scatterPoints(scatter, 'all')).toHaveLength(3);
  });

  it('draws the near mark as a quarter circle', () => {
    for (const [x, y] of quarterCircle(0.7)) expect(Math.hypot(x, y)).toBeCloseTo(0.7, 12);
  });
});
