import { newLineSchema, type NewLine } from '../../src/contract/register';

/** What a script would send to add a line: terminals and one version of settings with it. */
export function lineSent(change: Record<string, unknown> = {}): Record<string, unknown> {
  return {
    key: 'arden-birk',
    name: 'Arden – Birk',
    voltageKv: 220,
    ratingAmps: 1000,
    emergencyRatingAmps: 1200,
    lengthKm: 42.5,
    kind: 'overhead',
    capacitanceNfPerKm: 8.9,
    terminals: [
      { key: 'arden', substation: 'arden', substationName: 'Arden', ctPrimaryAmps: 1200, ctClass: '5P20' },
      { key: 'birk', substation: 'birk', substationName: 'Birk', ctPrimaryAmps: 1000, ctClass: '' },
    ],
    settings: [settingsSent()],
    ...change,
  };
}

export function settingsSent(change: Record<string, unknown> = {}): Record<string, unknown> {
  return {
    validFrom: '2026-03-01T10:00:00.000Z',
    characteristic: {
      kind: 'two-slope',
      pickupAmps: 120,
      slope1: 0.3,
      kneeAmps: 1500,
      slope2: 0.6,
      slopeStart: 'from-zero',
    },
    restraint: { kind: 'scaled-sum', factor: 0.5 },
    note: 'As commissioned.',
    ...change,
  };
}

export function terminalSent(key: string): Record<string, unknown> {
  return { key, substation: key, substationName: `Substation ${key}`, ctPrimaryAmps: 800, ctClass: '5P20' };
}

export const newLine = (change: Record<string, unknown> = {}): NewLine =>
  newLineSchema.parse(lineSent(change));
