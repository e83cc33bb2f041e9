import { cable380, km, overhead380 } from './conductors';
import { demoLine } from './line-sheet';
import { generation, transit } from './load-shapes';
import { adaptive, alphaPlane, fromPickup, fromZero, halfSum } from './settings-sheet';

export const lines380 = [
  demoLine({
    key: 'skelder-tarn-head',
    name: 'Skelder – Tarn Head',
    voltageKv: 380,
    ratingAmps: 2400,
    emergencyRatingAmps: 2760,
    at: ['skelder', 'tarn-head'],
    ctPrimaryAmps: 2500,
    ctClass: 'TPY',
    stretches: [[km(84, overhead380)]],
    settings: [alphaPlane('2023-09-18', { pickupAmps: 375, radius: 6, angleDeg: 195 })],
    leastInternalFaultAmps: 2900,
    load: transit(0.56),
    reportsToo: true,
  }),
  demoLine({
    key: 'ostrel-tarn-head',
    name: 'Ostrel – Tarn Head',
    voltageKv: 380,
    ratingAmps: 2000,
    emergencyRatingAmps: 2300,
    at: ['ostrel', 'tarn-head'],
    ctPrimaryAmps: 2000,
    ctClass: 'TPY',
    stretches: [[km(61, overhead380)]],
    settings: [
      adaptive('2022-05-30', {
        pickupAmps: 200,
        ctErrors: [
          { terminal: 'ostrel', errorBelow: 0.02, errorAbove: 0.05, limitAmps: 4000 },
          { terminal: 'tarn-head', errorBelow: 0.02, errorAbove: 0.05, limitAmps: 4000 },
        ],
        timeErrorMs: 0.1,
      }),
    ],
    leastInternalFaultAmps: 2400,
    load: transit(0.33, 'last'),
  }),
  demoLine({
    key: 'brindle-marrow-gate',
    name: 'Brindle – Marrow Gate',
    voltageKv: 380,
    ratingAmps: 1800,
    emergencyRatingAmps: 2100,
    at: ['brindle', 'marrow-gate'],
    ctPrimaryAmps: 2000,
    ctClass: '5P20',
    stretches: [[km(30, overhead380), km(5, cable380)]],
    settings: [
      halfSum('2021-11-08', fromPickup(360, [0.2, 2500, 0.5])),
      halfSum(
        '2024-06-04',
        fromPickup(300, [0.15, 2500, 0.5]),
        'Pickup and first slope lowered after the new transformers at Brindle.',
      ),
    ],
    load: transit(0.36),
  }),
  demoLine({
    key: 'tarn-head-brindle',
    name: 'Tarn Head – Brindle',
    voltageKv: 380,
    ratingAmps: 2500,
    emergencyRatingAmps: 2900,
    at: ['tarn-head', 'brindle'],
    ctPrimaryAmps: 2500,
    ctClass: 'TPY',
    stretches: [[km(118, overhead380)]],
    seriesCompensation: 0.45,
    settings: [
      halfSum('2020-03-16', fromZero(500, [0.3, 3000, 0.7])),
      halfSum(
        '2025-02-11',
        fromZero(375, [0.3, 3000, 0.7]),
        'Pickup lowered: study of weak infeed at Brindle.',
      ),
    ],
    load: generation(0.7),
    ctSpread: 0.5,
  }),
];
