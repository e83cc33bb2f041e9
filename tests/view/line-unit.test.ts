import { describe, expect, it } from 'vitest';
import { currentText } from '../../src/view/line-figures';
import { inUnit, unitFromAddress } from '../../src/view/line-unit';

describe('the unit of currents', () => {
  it('the address asks for per unit by "pu" and for nothing else', () => {
    expect(unitFromAddress('pu')).toBe('per unit');
    expect(unitFromAddress('PU')).toBe('amperes');
    expect(unitFromAddress(null)).toBe('amperes');
  });

  it('per unit is of the rating', () => {
    expect(inUnit(45, 'per unit', 900)).toBe(0.05);
    expect(inUnit(45, 'amperes', 900)).toBe(45);
  });

  it('what cannot be computed stays so in every unit', () => {
    expect(inUnit(null, 'per unit', 900)).toBeNull();
    expect(inUnit(NaN, 'amperes', 900)).toBeNull();
    expect(inUnit(45, 'per unit', 0)).toBeNull();
  });

  it('a missing current is a dash and never NaN', () => {
    expect(currentText(null, 'amperes', 900)).toBe('–');
    expect(currentText(NaN, 'per unit', 900)).toBe('–');
    expect(currentText(45, 'per unit', 900)).toBe('0.050\u00a0pu');
  });
});
