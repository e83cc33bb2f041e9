import type { LineSummary } from '../../contract/lines';
import type { Terminal } from '../../contract/register';
import type { Result } from '../../contract/result';
import { instantText } from '../../view/figures';
import { silences, terminalPanels } from '../../view/line-terminal-rows';
import type { TerminalPanel } from '../../view/line-terminal-rows';
import type { SiteCustom } from '../../view/site-custom';
import { PhaseSign } from '../marks/PhaseMarker';

interface Props {
  readonly line: LineSummary;
  readonly terminals: readonly Terminal[];
  readonly result: Result | undefined;
  readonly site: SiteCustom;
  readonly nowMs: number;
  readonly faded: boolean;
}

/** What each terminal says at the newest instant: phasors, validity, breaker, clock and channel. */
export function TerminalsPanel({ line, terminals, result, site, nowMs, faded }: Props) {
  const panels = terminalPanels(terminals, result?.terminals ?? [], {
    goesBy: line.goesBy,
    letters: site.phaseLetters,
    substations: line.substations,
    silentSince: silences(line.warnings, { nowMs, timeZone: site.timeZone }),
  });
  const at = result?.at ?? null;
  return (
    <section className="panel min-w-0 p-4 sm:p-[1.125rem]" aria-labelledby="terminals-title">
      <h2 id="terminals-title" className="m-0 text-body font-semibold">
        Terminals
      </h2>
      <p className="mt-0.5 text-caption text-ink-2">
        {at === null ? 'Nothing heard yet' : `Snapshot of ${instantText(at, nowMs, site.timeZone)}`}; currents
        positive into the line, angles to the common time reference
        {line.goesBy === 'reported' && '. Phasors can’t be told from this feed: it holds magnitudes only'}
      </p>
      {panels.length === 0 && (
        <p className="mt-3 text-ink-2">The register holds no terminal of this line yet.</p>
      )}
      <div className="mt-3 grid gap-x-8 gap-y-6 [grid-template-columns:repeat(auto-fit,minmax(min(100%,24rem),1fr))]">
        {panels.map((panel) => (
          <OneTerminal key={panel.key} panel={panel} faded={faded} phasorsShown={line.goesBy === 'phasors'} />
        ))}
      </div>
    </section>
  );
}

interface OneProps {
  readonly panel: TerminalPanel;
  readonly faded: boolean;
  readonly phasorsShown: boolean;
}

function OneTerminal({ panel, faded, phasorsShown }: OneProps) {
  return (
    <article className="@container min-w-0" aria-label={panel.name}>
      <h3 className="m-0 flex items-baseline justify-between gap-4 text-body font-medium">
        {panel.name}
        <span className="text-caption font-normal text-ink-2">current transformers {panel.transformer}</span>
      </h3>
      {panel.trouble !== undefined && (
        <p className="mt-1 border-l-2 border-dashed border-blind pl-2 text-blind">{panel.trouble}</p>
      )}
      {phasorsShown && <Phasors panel={panel} faded={faded} />}
      {panel.facts.length > 0 && (
        <dl className="m-0 mt-2 grid grid-cols-[5rem_1fr] gap-x-3 gap-y-0.5 @min-[38rem]:grid-cols-[5rem_1fr_5rem_1.4fr]">
          {panel.facts.map(({ name, value, bad }) => (
            <div key={name} className="contents">
              <dt className="text-ink-2">{name}</dt>
              <dd className={`live-value m-0 ${faded ? 'text-ink-2' : ''} ${bad ? 'font-semibold' : ''}`}>
                {value}
              </dd>
            </div>
          ))}
        </dl>
      )}
    </article>
  );
}

function Phasors({ panel, faded }: Omit<OneProps, 'phasorsShown'>) {
  const figure = `figure live-value ${faded ? 'text-ink-2' : ''}`;
  return (
    <table className="figures mt-1">
      <thead>
        <tr>
          <th scope="col">phase</th>
          <th scope="col" className="figure">
            current
          </th>
          <th scope="col" className="figure">
            angle
          </th>
          {panel.voltageShown && (
            <>
              <th scope="col" className="figure">
                voltage
              </th>
              <th scope="col" className="figure">
                angle
              </th>
            </>
          )}
        </tr>
      </thead>
      <tbody>
        {panel.phasors.map((row) => (
          <tr key={row.phase}>
            <th scope="row">
              <span className="inline-flex items-center gap-1.5 text-ink">
                <PhaseSign phase={row.phase} />
                {row.letter}
              </span>
            </th>
            <td className={figure}>{row.current}</td>
            <td className={figure}>{row.currentAngle}</td>
            {panel.voltageShown && (
              <>
                <td className={figure}>{row.voltage}</td>
                <td className={figure}>{row.voltageAngle}</td>
              </>
            )}
          </tr>
        ))}
      </tbody>
    </table>
  );
}
