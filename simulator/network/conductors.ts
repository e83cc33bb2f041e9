/** What a kilometre of line is made of, positive sequence at 50 Hz. */
export type Conductor = {
  readonly kind: 'overhead' | 'cable';
  readonly resistanceOhmPerKm: number;
  readonly reactanceOhmPerKm: number;
  readonly capacitanceNfPerKm: number;
};

const conductor = (
  kind: Conductor['kind'],
  [resistanceOhmPerKm, reactanceOhmPerKm, capacitanceNfPerKm]: readonly [number, number, number],
): Conductor => ({ kind, resistanceOhmPerKm, reactanceOhmPerKm, capacitanceNfPerKm });

/** Ordinary values of the trade: single and bundled overhead conductors, cables insulated with polyethylene. */
export const overhead110 = conductor('overhead', [0.118, 0.39, 9.5]);
export const overhead220 = conductor('overhead', [0.062, 0.32, 10]);
export const overhead380 = conductor('overhead', [0.029, 0.265, 12]);
export const cable110 = conductor('cable', [0.047, 0.125, 150]);
export const cable220 = conductor('cable', [0.028, 0.13, 180]);
export const cable380 = conductor('cable', [0.016, 0.135, 190]);

export type Stretch = { readonly of: Conductor; readonly km: number };
export const km = (length: number, of: Conductor): Stretch => ({ of, km: length });
