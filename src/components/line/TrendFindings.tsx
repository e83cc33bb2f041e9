import type { StandingVerdict } from '../../contract/standing';
import type { Creep } from '../../contract/warning';
import { driftWords, emergencyWords, stepWords } from '../../view/composition-words';
import type { StandingWordsContext } from '../../view/composition-words';
import { fittedAcross } from '../../view/trend-marks';

interface Props {
  readonly verdicts: readonly StandingVerdict[];
  /** the drift that is drawn; undefined where there is none */
  readonly creep: Creep | undefined;
  readonly context: StandingWordsContext;
  /** which snapshots are missing from the levels, in words */
  readonly missing: string | undefined;
}

/** What was found of the levels shown, in sentences: drift, step, and what is missing. */
export function TrendFindings({ verdicts, creep, context, missing }: Props) {
  const several = verdicts.length > 1;
  const sentences = verdicts.flatMap((verdict) => {
    const { step, phase } = verdict;
    const across =
      creep?.phase === phase && fittedAcross(step, creep.days, context.nowMs)
        ? ' The trend drawn above is fitted across this step.'
        : '';
    const lead = several ? `Phase ${context.site.phaseLetters[phase]}: ` : '';
    return [
      driftWords(verdict, context),
      emergencyWords(verdict, context),
      step === null
        ? undefined
        : `${lead}${several ? lowered(stepWords(step, context)) : stepWords(step, context)}${across}`,
    ].filter((sentence) => sentence !== undefined);
  });
  if (sentences.length === 0 && missing === undefined) return null;
  return (
    <div className="mt-2 grid max-w-[110ch] gap-1">
      {sentences.map((sentence) => (
        <p key={sentence} className="text-pretty">
          {sentence}
        </p>
      ))}
      {missing !== undefined && <p className="text-caption text-pretty text-ink-2">{missing}</p>}
    </div>
  );
}

const lowered = (sentence: string): string => `${sentence[0]!.toLowerCase()}${sentence.slice(1)}`;
