import { describe, expect, test } from 'vitest';
import { pickupWindow, STANDING_MULTIPLE_PRESET } from '../../src/protection/pickup-window';

const BOUNDS = {
  uncompensatedStandingAmps: 60,
  multiple: STANDING_MULTIPLE_PRESET,
  leastInternalFaultAmps: 400,
};

describe('pickup window', () => {
  test.each([
    { pickupAmps: 149, pickupLies: 'below' },
    { pickupAmps: 150, pickupLies: 'within' },
    { pickupAmps: 400, pickupLies: 'within' },
    { pickupAmps: 401, pickupLies: 'above' },
  ])('from 150 A to 400 A has $pickupAmps A $pickupLies', ({ pickupAmps, pickupLies }) => {
    expect(pickupWindow(pickupAmps, BOUNDS)).toEqual({ lowerAmps: 150, upperAmps: 400, pickupLies });
  });

  test('has no upper bound without a recorded fault current', () => {
    const open = { ...BOUNDS, leastInternalFaultAmps: undefined };
    expect(pickupWindow(9000, open)).toEqual({ lowerAmps: 150, upperAmps: undefined, pickupLies: 'within' });
  });

  test('is none where the bounds cross', () => {
    const crossed = { ...BOUNDS, leastInternalFaultAmps: 120 };
    expect(pickupWindow(130, crossed).pickupLies).toBe('no window');
  });

  test('may be a single value', () => {
    expect(pickupWindow(150, { ...BOUNDS, leastInternalFaultAmps: 150 }).pickupLies).toBe('within');
  });

  test('moves with the owner’s multiple', () => {
    expect(pickupWindow(150, { ...BOUNDS, multiple: 3 }).pickupLies).toBe('below');
  });
});
