import { describe, expect, it } from 'vitest';
import type { Condition } from '../../src/contract/condition';
import { boardCounts, boardLine, boardParts, bySubstation, matches, sorted } from '../../src/view/board';
import { boardSearch, parseBoardQuery, WHOLE_BOARD } from '../../src/view/board-query';
import { AT_MS, blindLine, lineWith, NOTHING_COMPUTED, phaseAt } from './sample-lines';

const line = (name: string, condition: Condition, worst?: number) =>
  boardLine(
    lineWith({
      name,
      key: name.toLowerCase(),
      condition,
      phases:
        worst === undefined
          ? { a: NOTHING_COMPUTED, b: NOTHING_COMPUTED, c: NOTHING_COMPUTED }
          : { a: phaseAt(worst), b: phaseAt(0.05), c: phaseAt(0.05) },
    }),
    AT_MS,
  );
const names = (lines: readonly { line: { name: string } }[]) => lines.map((one) => one.line.name);

describe('worst first', () => {
  it('goes over, near, rising, blind, not evaluated, then by utilisation', () => {
    const lines = [
      line('Calm', 'settled', 0.2),
      line('Unjudged', 'not evaluated'),
      line('Busier', 'settled', 0.4),
      line('Unseen', 'blind'),
      line('Climber', 'rising', 0.35),
      line('Nearer', 'near', 0.9),
      line('Near', 'near', 0.72),
      line('Beyond', 'over', 1.1),
    ];
    expect(names(sorted(lines, 'worst'))).toEqual([
      'Beyond',
      'Nearer',
      'Near',
      'Climber',
      'Unseen',
      'Unjudged',
      'Busier',
      'Calm',
    ]);
  });

  it('puts an unknown utilisation before the known ones, not at zero', () => {
    const lines = [line('Known', 'settled', 0.6), line('Unknown', 'blind')];
    expect(names(sorted(lines, 'utilisation'))).toEqual(['Unknown', 'Known']);
  });

  it('counts up numbers in names', () => {
    const lines = ['Hask 10', 'Hask 2', 'Hask 1'].map((name) => line(name, 'settled', 0.2));
    expect(names(sorted(lines, 'worst'))).toEqual(['Hask 1', 'Hask 2', 'Hask 10']);
  });
});

describe('the parts of the Board', () => {
  it('a blind line is never counted as settled, nor shown among the settled', () => {
    const lines = [boardLine(blindLine(), AT_MS), line('Calm', 'settled', 0.2)];
    expect(boardCounts(lines)).toMatchObject({ blind: 1, settled: 1, all: 2 });
    const parts = boardParts(lines, WHOLE_BOARD);
    expect(names(parts.attention)).toEqual(['Skelder – Hask']);
    expect(names(parts.settled)).toEqual(['Calm']);
  });

  it('a line that is not evaluated or out of service stands apart from the settled ones', () => {
    const lines = [line('Unjudged', 'not evaluated'), line('Off', 'out of service')];
    const parts = boardParts(lines, WHOLE_BOARD);
    expect(names(parts.quiet)).toEqual(['Unjudged', 'Off']);
    expect(parts.settled).toEqual([]);
    expect(boardCounts(lines).settled).toBe(0);
  });

  it('a line stands under each of its ends', () => {
    expect(bySubstation([line('Calm', 'settled', 0.2)]).map(({ name }) => name)).toEqual(['Hask', 'Skelder']);
  });
});

describe('the filters', () => {
  const one = line('Quillby – Hask 1', 'near', 0.8);
  it.each([
    ['', true],
    ['?text=quil+hask', true],
    ['?text=ostrel', false],
    ['?condition=near', true],
    ['?condition=settled', false],
    ['?voltage=110', true],
    ['?voltage=220', false],
    ['?substation=hask', true],
    ['?substation=ostrel', false],
  ])('%s shows the line: %s', (search, shown) => expect(matches(one, parseBoardQuery(search))).toBe(shown));

  it('go into the address and come back the same', () => {
    const query = {
      text: 'Low Pell',
      substation: 'hask',
      voltageKv: 220,
      condition: 'not evaluated',
      sort: 'name',
      group: 'substation',
    } as const;
    expect(parseBoardQuery(boardSearch(query))).toEqual(query);
    expect(boardSearch(WHOLE_BOARD)).toBe('');
  });

  it('take what they do not understand as not chosen', () => {
    expect(parseBoardQuery('?voltage=high&condition=fine&sort=up&group=x&substation=')).toEqual(WHOLE_BOARD);
  });
});
