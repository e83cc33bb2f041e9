import { useCallback, useEffect, useRef, useState } from 'react';
import type { ReplayRequest, ReplayState } from '../../contract/replay';
import { RequestRefused } from '../shell/api-request';
import { cancelReplay, fetchReplay, startReplay } from './replay-requests';

const LOOK_EVERY_MS = 400;

export interface RunningReplay {
  /** the newest that the server said of the replay shown */
  readonly state: ReplayState | undefined;
  /** why there is none, as a sentence */
  readonly problem: string | undefined;
  readonly busy: boolean;
  /** starts one; problems beside fields come back by the settings' paths */
  start(body: ReplayRequest): Promise<RequestRefused | undefined>;
  cancel(): void;
}

/** One replay of the server's: started from here, or the one that the address names. */
export function useReplay(key: string, initialId: string | undefined): RunningReplay {
  const [id, setId] = useState(initialId);
  const [state, setState] = useState<ReplayState>();
  const [problem, setProblem] = useState<string>();
  const [starting, setStarting] = useState(false);
  const busy = starting || (id !== undefined && problem === undefined && isGoing(state));
  useFollowed(id, { onState: setState, onProblem: setProblem });
  const start = useCallback(
    async (body: ReplayRequest) => {
      setStarting(true);
      setProblem(undefined);
      try {
        const started = await startReplay(key, body);
        setState(undefined);
        setId(started.id);
        keepInAddress(started.id);
        return undefined;
      } catch (error) {
        const refused = asRefusal(error);
        if (refused.fields.length === 0) setProblem(refused.message);
        return refused;
      } finally {
        setStarting(false);
      }
    },
    [key],
  );
  const cancel = useCallback(() => {
    if (id === undefined) return;
    cancelReplay(id).then(setState, (error: unknown) => setProblem(asRefusal(error).message));
  }, [id]);
  return { state, problem, busy, start, cancel };
}

const isGoing = (state: ReplayState | undefined): boolean => state === undefined || state.state === 'running';

/** Asks after a replay until it has ended; an answer missed is asked for again, an unknown replay is not. */
function useFollowed(
  id: string | undefined,
  told: { onState: (state: ReplayState) => void; onProblem: (problem: string) => void },
): void {
  const latest = useRef(told);
  useEffect(() => {
    latest.current = told;
  });
  useEffect(() => {
    if (id === undefined) return;
    const stop = new AbortController();
    let timer: ReturnType<typeof setTimeout> | undefined;
    const look = async () => {
      try {
        const state = await fetchReplay(id, stop.signal);
        latest.current.onState(state);
        if (state.state === 'running') timer = setTimeout(() => void look(), LOOK_EVERY_MS);
      } catch (error) {
        if (stop.signal.aborted) return;
        const refused = asRefusal(error);
        if (refused.status === undefined) timer = setTimeout(() => void look(), 5 * LOOK_EVERY_MS);
        else latest.current.onProblem(refused.message);
      }
    };
    void look();
    return () => {
      stop.abort();
      clearTimeout(timer);
    };
  }, [id]);
}

function keepInAddress(id: string): void {
  const url = new URL(window.location.href);
  url.searchParams.set('replay', id);
  window.history.replaceState(window.history.state, '', url);
}

const asRefusal = (error: unknown): RequestRefused =>
  error instanceof RequestRefused
    ? error
    : new RequestRefused('The replay could not be asked for.', undefined);
