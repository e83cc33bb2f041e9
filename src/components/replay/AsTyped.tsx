import type { ReplaySettings } from '../../contract/replay';
import type { SettingsVersion } from '../../contract/settings-version';
import { CharacteristicPicture } from './CharacteristicPicture';
import type { RunningReplay } from './use-replay';

interface Props {
  readonly replay: RunningReplay;
  /** undefined while the form does not make settings */
  readonly settings: ReplaySettings | undefined;
  readonly inForce: SettingsVersion | undefined;
}

/** In place of an answer: the characteristic as it is typed, over the recorded one. */
export function AsTyped({ replay: { state, busy }, settings, inForce }: Props) {
  return (
    <section className="panel p-4 sm:p-[1.125rem]" aria-labelledby="as-typed-title">
      <h2 id="as-typed-title" className="m-0 text-body font-semibold">
        As typed
      </h2>
      <p className="mt-0.5 text-caption text-ink-2" role="status">
        {statusWords(state?.state, busy)} {state?.problem}
      </p>
      <div className="mt-3 max-w-[32rem]">
        <CharacteristicPicture
          replayed={settings && { characteristic: settings.characteristic, points: [] }}
          recorded={inForce && { characteristic: inForce.characteristic, points: [] }}
        />
      </div>
      {inForce === undefined && (
        <p className="mt-2 text-ink-2">
          No settings are in force on this line, so there are none to set beside yours.
        </p>
      )}
    </section>
  );
}

function statusWords(state: string | undefined, busy: boolean): string {
  if (busy) return 'The answer comes when every snapshot has been judged.';
  if (state === 'cancelled') return 'The replay was cancelled. Run it again when you like.';
  if (state === 'failed') return 'There is no answer.';
  return 'No replay has been run yet.';
}
