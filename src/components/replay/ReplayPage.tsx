import { useEffect, useMemo, useRef, useState } from 'react';
import type { Proposal, ReplayRequest, ReplaySettings } from '../../contract/replay';
import type { SettingsVersion } from '../../contract/settings-version';
import type { ReplayLine } from '../../view/replay-problems';
import { periodOf, type PeriodChoice, type TypedPeriod } from '../../view/replay-period';
import { problemsByField, settingsFromTyped, typedSettings, type ReplayTyped } from '../../view/replay-typed';
import type { SiteCustom } from '../../view/site-custom';
import { AsTyped } from './AsTyped';
import { ProposalList } from './ProposalList';
import { ReplayAnswer } from './ReplayAnswer';
import { ReplayForm } from './ReplayForm';
import { ReplayProgress } from './ReplayProgress';
import { useReplay } from './use-replay';

export interface ReplayPageProps {
  readonly line: ReplayLine;
  /** oldest first */
  readonly versions: readonly SettingsVersion[];
  readonly inForce: SettingsVersion | undefined;
  readonly site: SiteCustom;
  readonly proposals: readonly Proposal[];
  readonly mayReplay: boolean;
  readonly mayKeep: boolean;
  readonly nowMs: number;
  readonly address: { readonly period: PeriodChoice; readonly replay: string | undefined };
  /** the last day as wall times, for the period's own fields */
  readonly wallTimes: { readonly from: string; readonly to: string };
}

/** What other settings would have done: a copy to change, a period, and the answer beside the recorded one. */
export function ReplayPage(props: ReplayPageProps) {
  const { line, versions, inForce, site, nowMs, mayReplay, mayKeep, address } = props;
  const recordedTyped = useMemo(() => typedSettings(inForce, line), [inForce, line]);
  const [typed, setTyped] = useState<ReplayTyped>(recordedTyped);
  const [period, setPeriod] = useState<TypedPeriod>({ choice: address.period, ...props.wallTimes });
  const [problems, setProblems] = useState<Readonly<Record<string, string>>>({});
  const [proposals, setProposals] = useState(props.proposals);
  const replay = useReplay(line.key, address.replay);
  const answer = useRef<HTMLDivElement>(null);
  const meant = useMemo(() => settingsFromTyped(typed, line), [typed, line]);
  useSeen(answer, replay.state?.state === 'done' || replay.state?.state === 'running');

  const run = async () => {
    const span = periodOf(period, { nowMs: Date.now(), timeZone: site.timeZone });
    const found = { ...meant.problems, ...(span.ok ? {} : span.problems) };
    setProblems(found);
    if (meant.settings === undefined || !span.ok || Object.keys(found).length > 0) return focusFirstProblem();
    const body: ReplayRequest = { settings: meant.settings, from: span.from, to: span.to };
    const refused = await replay.start(body);
    if (refused !== undefined && refused.fields.length > 0) {
      setProblems(problemsByField(refused.fields));
      focusFirstProblem();
    }
  };
  const result = replay.state?.state === 'done' ? replay.state.result : null;
  const isPossible = Object.keys(meant.problems).length === 0;
  useFormOf(result?.settings, {
    isFromAddress: replay.state?.id === address.replay,
    line,
    onTyped: setTyped,
  });
  return (
    <div className="grid gap-4">
      <header>
        <p className="text-ink-2">
          <a href={`/lines/${line.key}`} className="link">
            {line.name}
          </a>
        </p>
        <h1 className="m-0 mt-0.5 text-sentence font-medium text-balance">Replay under other settings</h1>
        <p className="mt-1 max-w-[76ch] text-pretty text-ink-2">
          What would other settings have done? Change the copy, choose a period, and every stored snapshot is
          judged again, beside the recorded settings of its time. Nothing is changed by it: not the register,
          not what is stored, not a device.
        </p>
      </header>
      <div className="grid items-start gap-4 lg:grid-cols-[23rem_minmax(0,1fr)] lg:gap-x-6">
        <ReplayForm
          line={line}
          typed={typed}
          recorded={inForce === undefined ? undefined : recordedTyped}
          onTyped={setTyped}
          period={period}
          onPeriod={setPeriod}
          problems={problems}
          busy={replay.busy}
          mayReplay={mayReplay}
          timeZone={site.timeZone}
          onRun={() => void run()}
        />
        <div ref={answer} className="grid min-w-0 scroll-mt-4 gap-4">
          {replay.problem !== undefined && (
            <p role="alert" className="border-l-4 border-over bg-panel py-2 pr-3 pl-3 font-medium">
              {replay.problem}
            </p>
          )}
          {replay.busy && (
            <ReplayProgress state={replay.state} onCancel={mayReplay ? replay.cancel : undefined} />
          )}
          {result !== null && replay.state !== undefined ? (
            <ReplayAnswer
              key={replay.state.id}
              id={replay.state.id}
              result={result}
              versions={versions}
              inForce={inForce}
              site={site}
              mayKeep={mayKeep}
              isOfForm={JSON.stringify(meant.settings) === JSON.stringify(result.settings)}
              nowMs={nowMs}
              onKept={(proposal) => setProposals((kept) => [proposal, ...kept])}
            />
          ) : (
            <AsTyped replay={replay} settings={isPossible ? meant.settings : undefined} inForce={inForce} />
          )}
        </div>
      </div>
      <ProposalList proposals={proposals} site={site} />
    </div>
  );
}

/** After a reload the form holds what the replay of the address tried. */
function useFormOf(
  settings: ReplaySettings | undefined,
  {
    isFromAddress,
    line,
    onTyped,
  }: { isFromAddress: boolean; line: ReplayLine; onTyped: (typed: ReplayTyped) => void },
): void {
  const taken = useRef(false);
  useEffect(() => {
    if (taken.current || settings === undefined || !isFromAddress) return;
    taken.current = true;
    onTyped(typedSettings(settings, line));
  }, [settings, isFromAddress, line, onTyped]);
}

/** Brings the answer into sight on a narrow screen, where it lies below the form. */
function useSeen(place: React.RefObject<HTMLDivElement | null>, there: boolean): void {
  useEffect(() => {
    const top = place.current?.getBoundingClientRect().top;
    if (there && top !== undefined && top > window.innerHeight * 0.8)
      place.current?.scrollIntoView({ block: 'start' });
  }, [place, there]);
}

function focusFirstProblem(): void {
  requestAnimationFrame(() =>
    document.querySelector<HTMLElement>('[data-replay-form] [aria-invalid=true]')?.focus(),
  );
}
