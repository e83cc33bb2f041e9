import type { LineSummary } from '../../contract/lines';
import type { SettingsVersion } from '../../contract/settings-version';
import type { Warning } from '../../contract/warning';
import { lineReason } from '../../view/cause-words';
import { ageText } from '../../view/figures';
import { lineFacts } from '../../view/line-facts';
import type { CurrentUnit } from '../../view/line-unit';
import { stateWords } from '../../view/open-warnings';
import type { SiteCustom } from '../../view/site-custom';
import { Choice } from '../charts/Choice';
import { ConditionMark } from '../marks/ConditionMark';
import { AcknowledgeButton } from '../warnings/AcknowledgeButton';

interface Props {
  readonly line: LineSummary;
  readonly terminalCount: number;
  readonly inForce: SettingsVersion | undefined;
  readonly site: SiteCustom;
  readonly nowMs: number;
  readonly faded: boolean;
  readonly mayAcknowledge: boolean;
  readonly onAcknowledged: (warning: Warning) => void;
  readonly unit: CurrentUnit;
  readonly onUnit: (unit: CurrentUnit) => void;
}

const UNITS = [
  { value: 'amperes', label: 'Amperes' },
  { value: 'per unit', label: 'Per unit of rating' },
] as const;

/** Which line this is, how it stands and why, and the next act. */
export function LineHeader(props: Props) {
  const { line, terminalCount, inForce, site, nowMs, faded, unit, onUnit } = props;
  const atMs = line.at === null ? undefined : Date.parse(line.at);
  const facts = lineFacts(line, { terminalCount, inForce, timeZone: site.timeZone });
  const { lead, rest } = lineReason(line, { site, nowMs, substations: line.substations });
  return (
    <header>
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <h1 className="m-0 text-sentence font-medium text-balance">{line.name}</h1>
        <ConditionMark
          condition={line.condition}
          age={faded && atMs !== undefined ? ageText(atMs, nowMs) : undefined}
          className="text-lead"
        />
      </div>
      <div className="mt-0.5 flex flex-wrap items-baseline justify-between gap-x-8 gap-y-1">
        <p className={`text-ink-2 ${faded ? 'italic' : ''}`}>
          {facts.join(' · ')} ·{' '}
          <span className="whitespace-nowrap">
            {atMs === undefined ? 'nothing heard yet' : `newest ${ageText(atMs, nowMs)}`}
          </span>
        </p>
        <Choice
          legend="Unit of the currents on this page"
          name="unit"
          value={unit}
          options={UNITS}
          onChoose={onUnit}
        />
      </div>
      <nav aria-label="More of this line" className="mt-1 flex flex-wrap gap-x-5 gap-y-1">
        <a className="link" href={`/lines/${line.key}/review`}>
          Review
        </a>
        <a className="link" href={`/lines/${line.key}/compare`}>
          Compare before and after
        </a>
        {line.goesBy === 'phasors' && inForce !== undefined && (
          <a className="link" href={`/lines/${line.key}/replay`}>
            What would other settings have done?
          </a>
        )}
      </nav>
      {lead !== '' && (
        <p className={`mt-2 max-w-[80ch] text-pretty ${faded ? 'text-ink-2' : ''}`}>
          <strong className="font-semibold">{lead}</strong>
          {rest}
        </p>
      )}
      <OpenOnes {...props} />
    </header>
  );
}

/** What waits to be acknowledged, each with its act; what stands acknowledged, with its note. */
function OpenOnes({ line, site, nowMs, mayAcknowledge, onAcknowledged }: Props) {
  const waiting = line.warnings.filter((warning) => warning.acknowledgedAt === null);
  const noted = line.warnings.filter((warning) => warning.acknowledgedAt !== null);
  return (
    <>
      {noted.map((warning) => (
        <p key={warning.id} className="mt-1 text-ink-2">
          {stateWords(warning, nowMs, site)}
        </p>
      ))}
      {waiting.map((warning) =>
        mayAcknowledge ? (
          <AcknowledgeButton
            key={warning.id}
            warning={warning}
            onAcknowledged={onAcknowledged}
            beside={<span className="self-center text-ink-2">{waitingWords(warning)}</span>}
          />
        ) : (
          <p key={warning.id} className="mt-1 text-ink-2">
            The warning “{warning.kind}” has not been acknowledged yet.
          </p>
        ),
      )}
    </>
  );
}

function waitingWords(warning: Warning): string {
  return warning.returnedAt === null
    ? `${warning.kind}, unacknowledged`
    : `${warning.kind}, returned to normal, unacknowledged`;
}
