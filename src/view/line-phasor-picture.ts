import { magnitude } from '../protection/phasor';
import type { Phasor } from '../protection/phasor';
import { phasorFit } from './line-phasor-sum';
import type { PhasorSum } from './line-phasor-sum';

interface PixelPoint {
  readonly x: number;
  readonly y: number;
}

/** An arrow of the drawing, in pixels. */
export interface PhasorArrow {
  readonly terminal: string;
  readonly from: PixelPoint;
  readonly to: PixelPoint;
}

/** The currents head to tail, or a magnified view of where they close, in pixels. */
export interface PhasorPicture {
  readonly arrows: readonly PhasorArrow[];
  /** what the currents leave over; undefined when it is too short to be drawn at this scale */
  readonly differential: { readonly from: PixelPoint; readonly to: PixelPoint } | undefined;
  readonly start: PixelPoint;
  readonly pixelsPerAmp: number;
}

interface Box {
  readonly width: number;
  readonly height: number;
  readonly margin: number;
}

/** An arrow shorter than its own head says nothing. */
const SHORTEST_PX = 7;

const ORIGIN: Phasor = { re: 0, im: 0 };

/** The whole polygon. */
export function wholePicture(sum: PhasorSum, box: Box): PhasorPicture {
  return picture(sum, [ORIGIN, ...sum.steps.map((step) => step.to)], box);
}

/**
 * The neighbourhood of the gap, magnified: what the currents leave over fills the box, and the long arrows run
 * out of it. Undefined when the whole polygon shows the gap well enough.
 */
export function closingPicture(sum: PhasorSum, box: Box): PhasorPicture | undefined {
  const whole = wholePicture(sum, box);
  if (sum.differentialAmps * whole.pixelsPerAmp > box.height / 3 || sum.differentialAmps <= 0)
    return undefined;
  const { re, im } = sum.differential;
  const reach = sum.differentialAmps * 0.35;
  return picture(
    sum,
    [
      { re: Math.min(0, re) - reach, im: Math.min(0, im) - reach },
      { re: Math.max(0, re) + reach, im: Math.max(0, im) + reach },
    ],
    box,
  );
}

function picture(sum: PhasorSum, shown: readonly Phasor[], box: Box): PhasorPicture {
  const fit = phasorFit(shown, box);
  const long = magnitude(sum.differential) * fit.pixelsPerAmp >= SHORTEST_PX;
  return {
    arrows: sum.steps.map(({ terminal, from, to }) => ({
      terminal,
      from: fit.place(from),
      to: fit.place(to),
    })),
    differential: long ? { from: fit.place(ORIGIN), to: fit.place(sum.differential) } : undefined,
    start: fit.place(ORIGIN),
    pixelsPerAmp: fit.pixelsPerAmp,
  };
}
