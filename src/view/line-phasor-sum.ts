import type { TerminalResult } from '../contract/result';
import { angleRad, magnitude, phasorFromPolar, rotate, sum } from '../protection/phasor';
import type { Phasor } from '../protection/phasor';
import type { PhaseName } from './phase';

/** One terminal's current as an arrow from the end of the one before. */
export interface PhasorStep {
  readonly terminal: string;
  readonly from: Phasor;
  readonly to: Phasor;
  readonly amps: number;
  readonly angleDeg: number;
}

/** The terminals' currents of one phase laid head to tail; what is left from the start to the end is the differential. */
export interface PhasorSum {
  readonly steps: readonly PhasorStep[];
  readonly differential: Phasor;
  readonly differentialAmps: number;
}

/**
 * The head-to-tail sum of one phase, turned so that the greatest current points right: turning every phasor
 * alike changes no magnitude and keeps the drawing still. `undefined` unless every
 * terminal in service sent its currents.
 */
export function phasorSum(
  terminals: readonly TerminalResult[],
  { phase, inService }: { phase: PhaseName; inService: readonly string[] },
): PhasorSum | undefined {
  const currents: { terminal: string; phasor: Phasor; angleDeg: number }[] = [];
  for (const key of inService) {
    const terminal = terminals.find((each) => each.key === key);
    if (terminal === undefined || !terminal.present || terminal.current === null) return undefined;
    const { current } = terminal;
    const [amps, angleDeg] = current[phase];
    currents.push({ terminal: key, phasor: phasorFromPolar(amps, (angleDeg * Math.PI) / 180), angleDeg });
  }
  if (currents.length === 0) return undefined;
  const greatest = currents.reduce((most, each) =>
    magnitude(each.phasor) > magnitude(most.phasor) ? each : most,
  );
  const turnRad = -angleRad(greatest.phasor);
  let reached: Phasor = { re: 0, im: 0 };
  const steps = currents.map(({ terminal, phasor, angleDeg }) => {
    const from = reached;
    reached = sum([from, rotate(phasor, turnRad)]);
    return { terminal, from, to: reached, amps: magnitude(phasor), angleDeg };
  });
  return { steps, differential: reached, differentialAmps: magnitude(reached) };
}

/** A window onto the plane of the currents, in pixels: y grows downwards on a screen and upwards on the plane. */
export interface PhasorFit {
  readonly pixelsPerAmp: number;
  place(point: Phasor): { x: number; y: number };
}

/** The largest scale at which all points fit into the box, centred. */
export function phasorFit(
  points: readonly Phasor[],
  { width, height, margin }: { width: number; height: number; margin: number },
): PhasorFit {
  const res = points.map((point) => point.re);
  const ims = points.map((point) => point.im);
  const [left, right, low, high] = [Math.min(...res), Math.max(...res), Math.min(...ims), Math.max(...ims)];
  const across = (width - 2 * margin) / Math.max(right - left, 1e-9);
  const up = (height - 2 * margin) / Math.max(high - low, 1e-9);
  const pixelsPerAmp = Math.min(across, up);
  return {
    pixelsPerAmp,
    place: ({ re, im }) => ({
      x: hundredths(width / 2 + (re - (left + right) / 2) * pixelsPerAmp),
      y: hundredths(height / 2 - (im - (low + high) / 2) * pixelsPerAmp),
    }),
  };
}

// Server and browser disagree in a sine's last digit, and would draw the same page differently.
const hundredths = (pixels: number): number => Math.round(pixels * 100) / 100;
