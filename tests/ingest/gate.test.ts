import { describe, expect, it } from 'vitest';
import { createGate } from '../../src/ingest/gate';

/** Whether a promise has settled by the time that everything already due has run. */
async function hasSettled(promise: Promise<void>): Promise<boolean> {
  let settled = false;
  void promise.then(() => (settled = true));
  await new Promise((resolve) => setImmediate(resolve));
  return settled;
}

describe('the gate to the worker', () => {
  it('asks nobody to wait until it is full', () => {
    const gate = createGate(3);
    expect([gate.enter(), gate.enter()]).toEqual([undefined, undefined]);
    expect(gate.enter()).toBeInstanceOf(Promise);
  });

  it('opens as soon as there is room for one, and not before', async () => {
    const gate = createGate(2);
    gate.enter();
    const second = gate.enter()!;
    const third = gate.enter()!;
    gate.leave(1);
    expect(await hasSettled(second)).toBe(false);
    gate.leave(1);
    expect([await hasSettled(second), await hasSettled(third)]).toEqual([true, true]);
  });

  it('fills and opens again and again', async () => {
    const gate = createGate(2);
    for (let round = 0; round < 3; round += 1) {
      expect(gate.enter()).toBeUndefined();
      const full = gate.enter()!;
      gate.leave(2);
      expect(await hasSettled(full)).toBe(true);
    }
  });

  it('takes no notice of leaving while nobody waits', () => {
    const gate = createGate(2);
    gate.enter();
    gate.leave(1);
    expect(gate.enter()).toBeUndefined();
  });
});
