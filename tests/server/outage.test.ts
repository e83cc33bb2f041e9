import { describe, expect, it } from 'vitest';
import { createOutage } from '../../src/server/outage';

describe('an outage of the database', () => {
  it('asks for growing pauses while it lasts, and is logged once and once when over', () => {
    const lines: string[] = [];
    const outage = createOutage((line) => lines.push(line));
    const pauses = [0, 5, 15, 35, 65, 600].map((second) => outage.met(second * 1000));
    expect(pauses).toEqual([5, 5, 10, 20, 30, 30]);
    outage.over();
    outage.over();
    expect(lines).toEqual([
      'The database does not answer; pages say so until it does.',
      'The database answers again.',
    ]);
  });
});
