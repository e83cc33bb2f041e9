import type { NewLine } from '../../src/contract/register';
import { cable110, km, overhead110 } from '../network/conductors';
import { type DemoLine, demoLine, type LineSheet } from '../network/line-sheet';
import { towns, works } from '../network/load-shapes';
import { fromZero, halfSum } from '../network/settings-sheet';
import type { LineTruth } from '../plant/truth';

/**
 * A second small network, one story a line, told over two years around the site's epoch. Beside each story stand
 * lines to which nothing happens but seasons and growth of load, which must not be taken for one.
 */

type Told = Pick<LineSheet, 'key' | 'name' | 'at' | 'load'> & Partial<LineSheet>;

/** A line of 110 kV like any other, but for what its story says. */
const story = (told: Told): DemoLine =>
  demoLine({
    voltageKv: 110,
    ratingAmps: 440,
    emergencyRatingAmps: 520,
    ctPrimaryAmps: 400,
    ctClass: '5P20',
    stretches: [[km(34, overhead110)]],
    settings: [halfSum('2019-05-06', fromZero(45, [0.2, 800, 0.6]))],
    ...told,
  });

const [A, B, C] = [0, 1, 2] as const;

const LOW_PICKUP = [halfSum('2019-05-06', fromZero(40, [0.2, 800, 0.6]))];

const creepingRatios = [
  story({
    key: 'dunmarsh-oxhollow',
    name: 'Dunmarsh – Oxhollow',
    at: ['dunmarsh', 'oxhollow'],
    settings: LOW_PICKUP,
    load: towns(0.6),
    ratioDrift: { terminal: 'oxhollow', phase: A, perDay: 0.00016, fromDay: -330, toDay: 300 },
  }),
  // at the first terminal, the one that the others are compared with
  story({
    key: 'calder-stye-oxhollow',
    name: 'Calder Stye – Oxhollow',
    at: ['calder-stye', 'oxhollow'],
    settings: LOW_PICKUP,
    load: works(0.6),
    ratioDrift: { terminal: 'calder-stye', phase: C, perDay: 0.00016, fromDay: -330, toDay: 300 },
  }),
];

const growingCharging = story({
  key: 'rimside-pellan-cross',
  name: 'Rimside – Pellan Cross cable',
  at: ['rimside', 'pellan-cross'],
  ratingAmps: 600,
  emergencyRatingAmps: 660,
  ctPrimaryAmps: 600,
  stretches: [[km(14, cable110)]],
  settings: [halfSum('2019-05-06', fromZero(80, [0.2, 900, 0.6]))],
  load: towns(0.45),
  capacitanceDrift: { phase: C, perDay: 0.0006, fromDay: -300, toDay: 300 },
});

const driftingClock = story({
  key: 'rimside-calder-stye',
  name: 'Rimside – Calder Stye',
  at: ['rimside', 'calder-stye'],
  load: towns(0.6),
  clockDrift: { 'calder-stye': { perDay: -0.3, fromDay: -320, toDay: 300 } },
});

/** Level steps: a transformer that gave way to one with another error, and a channel that took an uneven path. */
const steps = [
  story({
    key: 'dunmarsh-rimside',
    name: 'Dunmarsh – Rimside',
    at: ['dunmarsh', 'rimside'],
    load: works(0.55),
    replaced: { rimside: { phase: B, atDay: -40.4, error: [-2.6, -30] } },
  }),
  story({
    key: 'dunmarsh-pellan-cross',
    name: 'Dunmarsh – Pellan Cross',
    at: ['dunmarsh', 'pellan-cross'],
    load: towns(0.55),
    timeFrom: 'channel',
    channel: {
      usual: { path: 'main', delayMs: 3.9, asymmetryMs: -0.02 },
      lossPpm: 4,
      change: { atDay: -12.3, to: { path: 'reserve', delayMs: 5.8, asymmetryMs: -0.3 } },
    },
  }),
];

const gaps = [
  // creeps, and was silent for a month of it
  story({
    key: 'oxhollow-pellan-cross',
    name: 'Oxhollow – Pellan Cross',
    at: ['oxhollow', 'pellan-cross'],
    load: towns(0.6),
    ratioDrift: { terminal: 'pellan-cross', phase: B, perDay: 0.00016, fromDay: -330, toDay: 300 },
    gaps: { 'pellan-cross': [{ fromDay: -76, toDay: -45 }] },
  }),
  // settled, and back for two days only
  story({
    key: 'rimside-dunmarsh-east',
    name: 'Rimside – Dunmarsh East',
    at: ['rimside', 'dunmarsh'],
    load: { ...towns(0.5), yearlySwing: 0.2 },
    gaps: { dunmarsh: [{ fromDay: -33, toDay: -2 }] },
  }),
];

const settled = [
  story({
    key: 'oxhollow-rimside',
    name: 'Oxhollow – Rimside',
    at: ['oxhollow', 'rimside'],
    load: { ...towns(0.5), growthPerYear: 0.08 },
    ctSpread: 1.2,
  }),
  story({
    key: 'pellan-cross-calder-stye',
    name: 'Pellan Cross – Calder Stye',
    at: ['pellan-cross', 'calder-stye'],
    load: { ...towns(0.5), yearlySwing: 0.25 },
    ctSpread: 1.2,
  }),
  story({
    key: 'calder-stye-dunmarsh',
    name: 'Calder Stye – Dunmarsh',
    at: ['calder-stye', 'dunmarsh'],
    load: { ...works(0.5), yearlySwing: 0.2, growthPerYear: 0.06 },
    ctSpread: 1.2,
  }),
];

const network = [...creepingRatios, growingCharging, driftingClock, ...steps, ...gaps, ...settled];

/** The register's entries of the story lines. */
export const storyLines: readonly NewLine[] = network.map(({ line }) => line);

/** What is physically so on each of them. */
export const storyTruths: readonly LineTruth[] = network.map(({ truth }) => truth);
