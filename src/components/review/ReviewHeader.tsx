import type { LineSummary } from '../../contract/lines';
import type { SettingsVersion } from '../../contract/settings-version';
import { ageText, dateText } from '../../view/figures';
import { lineWords } from '../../view/line-words';
import { characteristicName } from '../../view/line-settings-rows';
import { PRESET_WORDS, REVIEW_PRESETS } from '../../view/review-period';
import type { ReviewPeriod, ReviewPreset } from '../../view/review-period';
import type { SiteCustom } from '../../view/site-custom';
import { Choice } from '../charts/Choice';
import { ConditionMark } from '../marks/ConditionMark';
import { PeriodFields } from './PeriodFields';

interface Props {
  readonly line: LineSummary;
  readonly inForce: SettingsVersion | undefined;
  readonly site: SiteCustom;
  readonly nowMs: number;
  readonly faded: boolean;
  readonly period: ReviewPeriod;
  readonly onPeriod: (period: ReviewPeriod) => void;
}

type PeriodChoice = ReviewPreset | 'between';

const PERIODS: readonly { value: PeriodChoice; label: string }[] = [
  ...REVIEW_PRESETS.map((value) => ({ value, label: PRESET_WORDS[value] })),
  { value: 'between', label: 'Between' },
];

/** Which line is under review, by which settings, over which time, and the way on to other settings. */
export function ReviewHeader({ line, inForce, site, nowMs, faded, period, onPeriod }: Props) {
  const atMs = line.at === null ? undefined : Date.parse(line.at);
  const facts = [
    lineWords(line),
    ...(inForce === undefined
      ? ['no settings recorded']
      : [
          `${characteristicName(inForce.characteristic.kind)}, settings of ${dateText(inForce.validFrom, site.timeZone)}`,
        ]),
    atMs === undefined ? 'nothing heard yet' : `newest ${ageText(atMs, nowMs)}`,
  ];
  const choose = (value: PeriodChoice) =>
    onPeriod(
      value === 'between'
        ? { kind: 'between', fromMs: nowMs - 24 * 3_600_000, toMs: nowMs }
        : { kind: 'preset', preset: value },
    );
  return (
    <header>
      <p className="mb-1">
        <a className="link" href={`/lines/${line.key}`}>
          Back to the line
        </a>
      </p>
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <h1 className="m-0 text-sentence font-medium text-balance">Review of {line.name}</h1>
        <ConditionMark
          condition={line.condition}
          age={faded && atMs !== undefined ? ageText(atMs, nowMs) : undefined}
          className="text-lead"
        />
      </div>
      <p className={`mt-0.5 text-ink-2 ${faded ? 'italic' : ''}`}>{facts.join(' · ')}</p>
      <div className="mt-3 flex flex-wrap items-center justify-between gap-x-8 gap-y-2">
        <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
          <Choice
            legend="Period of the cloud"
            name="period"
            value={period.kind === 'preset' ? period.preset : 'between'}
            options={PERIODS}
            onChoose={choose}
          />
          {period.kind === 'between' && <PeriodFields period={period} onPeriod={onPeriod} />}
        </div>
        {line.goesBy === 'phasors' && inForce !== undefined && (
          <a className="button button-first" href={`/lines/${line.key}/replay`}>
            What would other settings have done?
          </a>
        )}
      </div>
    </header>
  );
}
