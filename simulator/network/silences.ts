/** A terminal that loses its supply for minutes, by a timetable from when the terminals start. */
export type Silence = {
  readonly line: string;
  readonly terminal: string;
  readonly firstMs: number;
  readonly everyMs: number;
  readonly lastsMs: number;
};

export const demoSilences: readonly Silence[] = [
  { line: 'brindle-quillby', terminal: 'quillby', firstMs: 90_000, everyMs: 600_000, lastsMs: 180_000 },
];

/** Whether a terminal is without supply a while after the terminals started. */
export function isSilent(silence: Silence, sinceStartMs: number): boolean {
  const sinceFirstMs = sinceStartMs - silence.firstMs;
  return sinceFirstMs >= 0 && sinceFirstMs % silence.everyMs < silence.lastsMs;
}
