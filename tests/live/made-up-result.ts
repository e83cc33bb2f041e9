import type { Result } from '../../src/contract/result';
import type { Warning } from '../../src/contract/warning';

const phase = (differentialAmps: number) => ({
  differentialAmps,
  restraintAmps: 400,
  thresholdAmps: 120,
  utilisation: differentialAmps / 120,
});

/** A result of a line; by its differential current one is told from the next. */
export const resultOf = (line: string, differentialAmps: number): Result => ({
  line,
  at: '2026-03-02T10:00:00.000Z',
  publishedAt: '2026-03-02T10:00:00.130Z',
  condition: 'settled',
  reason: null,
  phases: { a: phase(differentialAmps), b: phase(8), c: phase(12) },
  throughAmps: 400,
  throughRatio: 0.4,
  compensation: 'none',
  settingsVersion: 1,
  terminals: [],
});

export const warningOf = (id: number, line: string, change: Partial<Warning> = {}): Warning => ({
  id,
  line,
  lineName: line,
  kind: 'near',
  state: 'unacknowledged',
  cause: {
    basis: 'utilisation',
    phase: 'a',
    utilisation: 0.75,
    limit: 0.7,
    differentialAmps: 90,
    thresholdAmps: 120,
  },
  openedAt: '2026-03-02T10:00:00.000Z',
  returnedAt: null,
  acknowledgedAt: null,
  acknowledgedBy: null,
  note: null,
  changedAt: '2026-03-02T10:00:00.040Z',
  ...change,
});
