import { describe, expect, it } from 'vitest';
import { periodOf } from '../../src/view/replay-period';

const nowMs = Date.parse('2026-03-30T10:00:00.000Z');
const context = { nowMs, timeZone: 'Europe/Berlin' };
const typed = (from: string, to: string) => periodOf({ choice: 'typed', from, to }, context);

describe('the period of a replay', () => {
  it('of a preset ends now', () => {
    expect(periodOf({ choice: '7d', from: '', to: '' }, context)).toEqual({
      ok: true,
      from: '2026-03-23T10:00:00.000Z',
      to: '2026-03-30T10:00:00.000Z',
    });
  });

  it('as typed is the site’s clock time, on either side of a change of the clocks', () => {
    expect(typed('2026-03-28T12:00', '2026-03-29T12:00')).toEqual({
      ok: true,
      from: '2026-03-28T11:00:00.000Z',
      to: '2026-03-29T10:00:00.000Z',
    });
  });

  it.each([
    ['', '2026-03-29T12:00', ['from']],
    ['2026-03-29T12:00', 'soon', ['to']],
    ['2026-03-29T12:00', '2026-03-29T12:00', ['to']],
    ['2026-01-01T00:00', '2026-03-29T12:00', ['from']],
  ])('from “%s” to “%s” is refused beside %o', (from, to, fields) => {
    const period = typed(from, to);
    expect(period.ok ? [] : Object.keys(period.problems)).toEqual(fields);
  });
});
