import type { Proposal, ReplayResult } from '../../contract/replay';
import type { SettingsVersion } from '../../contract/settings-version';
import {
  coverageSentences,
  markSentence,
  periodText,
  resultSentence,
  utilisationState,
  worstOf,
} from '../../view/replay-words';
import { sidesDrawn } from '../../view/replay-sides';
import type { SiteCustom } from '../../view/site-custom';
import { CharacteristicPicture } from './CharacteristicPicture';
import { DistributionPanel } from './DistributionPanel';
import { KeepProposal } from './KeepProposal';
import { SidesTable } from './SidesTable';

interface Props {
  readonly id: string;
  readonly result: ReplayResult;
  readonly versions: readonly SettingsVersion[];
  readonly inForce: SettingsVersion | undefined;
  readonly site: SiteCustom;
  readonly mayKeep: boolean;
  /** the form still holds what was tried */
  readonly isOfForm: boolean;
  readonly nowMs: number;
  readonly onKept: (proposal: Proposal) => void;
}

const INK = { settled: '', near: 'text-near', over: 'text-over' } as const;

/** The answer: a sentence, the figures of both sides, how they are distributed, and the way to keep it. */
export function ReplayAnswer(props: Props) {
  const { id, result, versions, inForce, site, mayKeep, isOfForm, nowMs, onKept } = props;
  const { phaseLetters: letters, timeZone } = site;
  const worst = worstOf(result.replayed);
  const state = worst === undefined ? 'settled' : utilisationState(worst.point.utilisation, result.nearRatio);
  const mark = markSentence(result);
  return (
    <>
      <section aria-live="polite">
        {!isOfForm && (
          <p className="mt-0 mb-1.5 border-l-4 border-accent bg-panel py-1 pl-3">
            The form has been changed since. This answer is of what was tried; run it again for yours.
          </p>
        )}
        <p className="m-0 max-w-[46ch] text-[1.375rem] leading-tight font-medium text-pretty">
          {resultSentence(result, letters)}
        </p>
        {mark && <p className={`mt-1 font-semibold ${INK[state]}`}>{mark}</p>}
        <p className="mt-1.5 max-w-[84ch] text-pretty text-ink-2">
          {periodText(result, timeZone)}. {coverageSentences(result).join(' ')}
        </p>
      </section>
      {result.snapshots > 0 && (
        <>
          <section className="panel min-w-0 p-4 sm:p-[1.125rem]" aria-labelledby="sides-title">
            <h2 id="sides-title" className="m-0 text-body font-semibold">
              Side by side
            </h2>
            <p className="mt-0.5 mb-2 text-caption text-ink-2">
              Utilisation of each phase; snapshots and how long they lasted. A recorded figure goes by the
              version in force at its snapshot, with the terminals that the register holds in service today
            </p>
            <SidesTable summary={result} letters={letters} timeZone={timeZone} />
            <div className="mt-4 max-w-[32rem]">
              <CharacteristicPicture {...sidesDrawn(result, versions, inForce)} />
            </div>
          </section>
          <DistributionPanel result={result} site={site} nowMs={nowMs} />
          {mayKeep && <KeepProposal line={result.line} replay={id} onKept={onKept} />}
        </>
      )}
    </>
  );
}
