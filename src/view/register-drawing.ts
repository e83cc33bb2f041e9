import type { TwoSlope } from '../protection/two-slope';
import { characteristicPath, characteristicProblems } from '../protection/characteristic';
import { ampsText } from './figures';

/** A characteristic as a small drawing: pixel points of the threshold, and where its labels stand. */
export interface CharacteristicDrawing {
  readonly threshold: readonly (readonly [number, number])[];
  readonly pickupY: number;
  /** undefined when the knee is at zero and there is only one slope */
  readonly kneeX: number | undefined;
  readonly pickupLabel: string;
  readonly kneeLabel: string;
  readonly restraintLabel: string;
}

export interface DrawingBox {
  readonly width: number;
  readonly height: number;
  readonly left: number;
  readonly bottom: number;
}

/** Undefined while the settings are not ones that a scheme can have. */
export function characteristicDrawing(
  settings: TwoSlope,
  box: DrawingBox,
): CharacteristicDrawing | undefined {
  if (characteristicProblems(settings).length > 0) return undefined;
  const cornerAmps =
    settings.slopeStart === 'from-zero' && settings.slope1 > 0 ? settings.pickupAmps / settings.slope1 : 0;
  const restraintAmpsMax = 1.6 * Math.max(settings.kneeAmps, cornerAmps, 2 * settings.pickupAmps);
  const path = characteristicPath(settings, restraintAmpsMax);
  const thresholdAmpsMax = 1.12 * path[path.length - 1]!.thresholdAmps;
  const x = (amps: number) => box.left + (amps / restraintAmpsMax) * (box.width - box.left);
  const y = (amps: number) => (1 - amps / thresholdAmpsMax) * (box.height - box.bottom);
  return {
    threshold: path.map((point) => [x(point.restraintAmps), y(point.thresholdAmps)] as const),
    pickupY: y(settings.pickupAmps),
    kneeX: settings.kneeAmps > 0 ? x(settings.kneeAmps) : undefined,
    pickupLabel: ampsText(settings.pickupAmps),
    kneeLabel: ampsText(settings.kneeAmps),
    restraintLabel: ampsText(restraintAmpsMax),
  };
}

/** The settings that a form's fields make, slopes from per cent; whatever is not a number becomes NaN, which no drawing has. */
export function settingsTyped(typed: Readonly<Record<string, string | undefined>>): TwoSlope {
  const amount = (text: string | undefined) => (text?.trim() ? Number(text.trim().replace(',', '.')) : NaN);
  return {
    kind: 'two-slope',
    pickupAmps: amount(typed.pickupAmps),
    slope1: amount(typed.slope1) / 100,
    kneeAmps: amount(typed.kneeAmps),
    slope2: amount(typed.slope2) / 100,
    slopeStart: typed.slopeStart === 'from-pickup' ? 'from-pickup' : 'from-zero',
  };
}
