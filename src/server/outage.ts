const PAUSES_S = [5, 10, 20, 30] as const;

/** How long the database has been away, as requests find it, and when to try again. */
export interface Outage {
  /** Says in how many seconds the browser should try again: the longer it lasts, the longer the pause. */
  met(nowMs: number): number;
  over(): void;
}

export function createOutage(log: (line: string) => void): Outage {
  let sinceMs: number | undefined;
  return {
    met(nowMs) {
      if (sinceMs === undefined) {
        sinceMs = nowMs;
        log('The database does not answer; pages say so until it does.');
      }
      const lastedS = (nowMs - sinceMs) / 1000;
      return PAUSES_S.find((pauseS) => lastedS < pauseS * 2) ?? PAUSES_S.at(-1)!;
    },
    over() {
      if (sinceMs !== undefined) log('The database answers again.');
      sinceMs = undefined;
    },
  };
}
