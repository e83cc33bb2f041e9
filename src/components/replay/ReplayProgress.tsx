import type { ReplayState } from '../../contract/replay';
import { percentText } from '../../view/figures';
import { countText } from '../../view/replay-words';

interface Props {
  /** undefined until the server has said something */
  readonly state: ReplayState | undefined;
  /** undefined for whoever may not */
  readonly onCancel: (() => void) | undefined;
}

/** How far a running replay is, and the way to stop it. */
export function ReplayProgress({ state, onCancel }: Props) {
  const ratio = state?.progress ?? 0;
  return (
    <section className="panel flex flex-wrap items-center gap-x-5 gap-y-2 p-4" aria-label="Replay running">
      <label className="min-w-0 flex-1 basis-60">
        <span className="block">
          Judging the stored snapshots: {percentText(ratio)}
          <span className="text-ink-2"> · {countText(state?.snapshots ?? 0)} so far</span>
        </span>
        <progress max={1} value={ratio} className="replay-progress mt-1.5 block h-2 w-full" />
      </label>
      {onCancel && (
        <button type="button" className="button" onClick={onCancel}>
          Cancel
        </button>
      )}
    </section>
  );
}
