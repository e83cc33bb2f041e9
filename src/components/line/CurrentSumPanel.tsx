import type { LineSummary } from '../../contract/lines';
import type { Result } from '../../contract/result';
import { CONDITION_INK } from '../../view/condition-words';
import { currentText, degreesText } from '../../view/line-figures';
import { closingPicture, wholePicture } from '../../view/line-phasor-picture';
import { phasorSum } from '../../view/line-phasor-sum';
import type { CurrentUnit } from '../../view/line-unit';
import { terminalName } from '../../view/line-words';
import { PHASES } from '../../view/phase';
import type { PhaseName } from '../../view/phase';
import { phaseCondition } from '../../view/phase-condition';
import type { SiteCustom } from '../../view/site-custom';
import { Choice } from '../charts/Choice';
import { PhasorDrawing, StrokeSample } from './PhasorDrawing';

interface Props {
  readonly line: LineSummary;
  /** the terminals in service, whose currents add up */
  readonly inService: readonly string[];
  readonly result: Result | undefined;
  readonly site: SiteCustom;
  readonly unit: CurrentUnit;
  readonly faded: boolean;
  readonly phase: PhaseName;
  readonly onPhase: (phase: PhaseName) => void;
  /** what was done to the measured currents before, in words */
  readonly broughtBy?: string | undefined;
}

const BOX = { width: 300, height: 132, margin: 16 } as const;

/** How the terminals' currents of one phase add up, laid head to tail, and what they leave over. */
export function CurrentSumPanel(props: Props) {
  const { line, site, phase, onPhase, broughtBy } = props;
  const options = PHASES.map((each) => ({ value: each, label: site.phaseLetters[each] }));
  const byPhasors = line.goesBy === 'phasors';
  return (
    <section className="panel min-w-0 p-4 sm:p-[1.125rem]" aria-labelledby="sum-title">
      <div className="flex flex-wrap items-start justify-between gap-x-6">
        <div>
          <h2 id="sum-title" className="m-0 text-body font-semibold">
            How the currents of phase {site.phaseLetters[phase]} add up
          </h2>
          <p className="mt-0.5 text-caption text-ink-2">
            Head to tail, positive into the line{broughtBy === undefined ? '' : `, ${broughtBy}`}, turned so
            that the greatest points right
          </p>
        </div>
        {byPhasors && (
          <Choice legend="Phase drawn" name="sum-phase" value={phase} options={options} onChoose={onPhase} />
        )}
      </div>
      {byPhasors ? <Sum {...props} /> : <NoPhasors />}
    </section>
  );
}

function NoPhasors() {
  return (
    <p className="mt-3 max-w-[60ch] text-ink-2">
      This line goes by reported magnitudes: its feed holds only what one terminal computed for itself. How
      the terminals’ currents add up as phasors can’t be told from this feed.
    </p>
  );
}

function Sum({ line, inService, result, site, unit, faded, phase }: Props) {
  // Where no differential is computed, as with a broken clock, the plain sum is none either.
  const told = line.phases[phase].differentialAmps !== null;
  const sum = result === undefined || !told ? undefined : phasorSum(result.terminals, { phase, inService });
  if (sum === undefined)
    return (
      <p className="mt-3 text-ink-2">
        {line.reason ?? 'Not every terminal has sent its currents for the newest instant.'}
      </p>
    );
  const shown = (amps: number) => currentText(amps, unit, line.ratingAmps);
  const whole = wholePicture(sum, BOX);
  const closing = closingPicture(sum, BOX);
  const condition = phaseCondition(line, phase, site.nearRatio);
  const marked = condition === 'over' || condition === 'near' || condition === 'rising';
  const ink = faded ? 'text-ink-2' : marked ? CONDITION_INK[condition] : 'text-ink';
  const words = `The currents of phase ${site.phaseLetters[phase]} leave ${shown(sum.differentialAmps)} over.`;
  return (
    <div className="mt-3 grid gap-x-6 gap-y-3 sm:grid-cols-2">
      <figure className="m-0 min-w-0">
        <PhasorDrawing picture={whole} {...BOX} label={words} ink={ink} faded={faded} />
        <figcaption className="mt-1 text-caption text-ink-2">all of it</figcaption>
      </figure>
      {closing !== undefined && (
        <figure className="m-0 min-w-0">
          <PhasorDrawing picture={closing} {...BOX} label={`${words} Magnified.`} ink={ink} faded={faded} />
          <figcaption className="mt-1 text-caption text-ink-2">
            where it ends, magnified {Math.round(closing.pixelsPerAmp / whole.pixelsPerAmp)} times
          </figcaption>
        </figure>
      )}
      <ul className={`m-0 list-none p-0 sm:col-span-2 ${faded ? 'text-ink-2' : ''}`}>
        {sum.steps.map((step, index) => (
          <li key={step.terminal} className="flex items-center gap-2.5 border-b border-hairline py-1">
            <StrokeSample index={index} />
            <span className="flex-1">{terminalName(step.terminal, line.substations)}</span>
            <span className="live-value w-20 text-right">{shown(step.amps)}</span>
            <span className="live-value w-16 text-right">{degreesText(step.angleDeg)}</span>
          </li>
        ))}
        <li className={`flex items-center gap-2.5 py-1 ${ink}`}>
          <span className="w-[26px] border-t-[2.5px] border-current" aria-hidden="true" />
          <span className="flex-1">left over: the differential current</span>
          <span className="live-value w-20 text-right">{shown(sum.differentialAmps)}</span>
          <span className="w-16" />
        </li>
      </ul>
    </div>
  );
}
