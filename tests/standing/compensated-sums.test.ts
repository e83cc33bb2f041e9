import { describe, expect, it } from 'vitest';
import { minus, times, type Complex } from '../../src/standing/complex';
import { compensatedSums } from '../../src/standing/compensated-sums';
import { addSnapshot, emptySums, packedSums } from '../../src/standing/composition-sums';
import { seededRandom } from '../protection/seeded-random';

const SHAPE = { terminalCount: 3, hasVoltage: true };
const B = 0.29;

describe('sums with the charging taken out', () => {
  it('are those of differentials with the charging taken out one by one', () => {
    const random = seededRandom(7);
    const complex = (size: number): Complex => ({ re: size * (random() - 0.5), im: size * (random() - 0.5) });
    const [plain, compensated] = [emptySums(SHAPE), emptySums(SHAPE)];
    for (let snapshot = 0; snapshot < 50; snapshot += 1) {
      const differentialAmps = complex(90);
      const voltageKv = complex(130);
      const rest = { voltageKv, otherCurrentsAmps: [complex(800), complex(400)], throughAmps: 300 };
      addSnapshot(plain, { differentialAmps, ...rest });
      const charging = times({ re: 0, im: B }, voltageKv);
      addSnapshot(compensated, { differentialAmps: minus(differentialAmps, charging), ...rest });
    }
    const wanted = packedSums(compensated);
    packedSums(compensatedSums(plain, B)!).forEach((value, index) => {
      expect(Math.abs(value - wanted[index]!), `number ${index}`).toBeLessThan(
        1e-6 * Math.abs(wanted[index]!) + 1e-6,
      );
    });
  });

  it('are those of before without anything to take out, and none without a voltage', () => {
    const sums = emptySums(SHAPE);
    expect(packedSums(compensatedSums(sums, 0)!)).toEqual(packedSums(sums));
    expect(compensatedSums(emptySums({ ...SHAPE, hasVoltage: false }), B)).toBeUndefined();
  });
});
