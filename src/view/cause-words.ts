import type { LineSummary } from '../contract/lines';
import type { Warning, WarningCause } from '../contract/warning';
import { ampsText, durationText, instantText, percentOfMarkText, percentText } from './figures';
import { creepForecastWords, slopeWords } from './forecast';
import { listed, terminalName } from './line-words';
import { worstPhase } from './phase-condition';
import type { SiteCustom } from './site-custom';

/** A reason in words: the lead is set in bold, the rest goes on from it. Both are whole sentences together. */
export interface ReasonWords {
  readonly lead: string;
  readonly rest: string;
}

export interface WordsContext {
  readonly site: SiteCustom;
  readonly nowMs: number;
  /** names of the line's ends, to write terminals by */
  readonly substations: LineSummary['substations'];
}

/** What raised a warning, with the figures that did. */
export function causeWords(cause: WarningCause, context: WordsContext): ReasonWords {
  switch (cause.basis) {
    case 'utilisation':
      return {
        lead: `Phase ${context.site.phaseLetters[cause.phase]} at ${percentOfMarkText(cause.utilisation)} of its threshold`,
        rest: `: ${againstText(cause)}.`,
      };
    case 'standing level':
      return {
        lead: `Phase ${context.site.phaseLetters[cause.phase]} has stood at ${percentText(cause.levelAmps / cause.pickupAmps)} of the pickup for a day`,
        rest: `: ${ampsText(cause.levelAmps)} of ${ampsText(cause.pickupAmps)}.`,
      };
    case 'creep':
      return {
        lead: `Phase ${context.site.phaseLetters[cause.creep.phase]} rises ${slopeWords(cause.creep)}.`,
        rest: ` ${creepForecastWords(cause.creep, null, context)}`,
      };
    case 'step':
      return {
        lead: `Phase ${context.site.phaseLetters[cause.phase]} stepped from ${ampsText(cause.fromAmps)} to ${ampsText(cause.toAmps)}`,
        rest: ` at ${instantText(cause.at, context.nowMs, context.site.timeZone)}${cause.channelPathChanged ? ', when the channel took another path' : ''}.`,
      };
    case 'terminal silent':
      return ends(cause.terminals, context, { one: 'is silent', many: 'are silent' });
    case 'validity':
      return ends(cause.terminals, context, {
        one: 'marks its values as not good',
        many: 'mark their values as not good',
      });
    case 'clock':
      return ends(cause.terminals, context, {
        one: 'has lost its common time',
        many: 'have lost their common time',
      });
  }
}

function ends(
  terminals: readonly string[],
  context: WordsContext,
  verb: { readonly one: string; readonly many: string },
): ReasonWords {
  const names = terminals.map((key) => terminalName(key, context.substations));
  if (names.length === 0)
    return { lead: 'A terminal cannot be used.', rest: ' The differential cannot be computed.' };
  return {
    lead: `${listed(names)} ${names.length === 1 ? verb.one : verb.many}.`,
    rest: ' The differential cannot be computed.',
  };
}

/** The open warning that speaks for the line's condition, if there is one. */
const speakingWarning = (line: LineSummary): Warning | undefined =>
  line.warnings.find((warning) => warning.kind === line.condition && warning.returnedAt === null);

/** Why a line is not settled, with the figures of now where they are live, and how long it has been so. */
export function lineReason(line: LineSummary, context: WordsContext): ReasonWords {
  const warning = speakingWarning(line);
  const lasting = warning === undefined ? '' : durationText(context.nowMs - Date.parse(warning.openedAt));
  switch (line.condition) {
    case 'over':
    case 'near':
      return { ...nearReason(line, warning, { context, lasting }) };
    case 'rising':
      return risingReason(line, warning, context);
    case 'blind':
      return blindReason(line, warning, { context, lasting });
    case 'not evaluated':
      return { lead: 'Not evaluated.', rest: ` ${line.reason ?? 'No settings are recorded for this line.'}` };
    case 'out of service':
      return {
        lead: 'Out of service.',
        rest: ` ${line.reason ?? 'Nothing is judged meanwhile.'}`,
      };
    case 'settled':
      return { lead: '', rest: '' };
  }
}

function nearReason(
  line: LineSummary,
  warning: Warning | undefined,
  { context, lasting }: { context: WordsContext; lasting: string },
): ReasonWords {
  const phase = worstPhase(line);
  const utilisation = phase === undefined ? null : line.phases[phase].utilisation;
  const byLevel = utilisation === null || utilisation < context.site.nearRatio;
  if (byLevel && warning !== undefined) {
    const words = causeWords(warning.cause, context);
    return { lead: words.lead, rest: `${words.rest}${chargingWords(line)}` };
  }
  if (phase === undefined) return { lead: 'Near its threshold.', rest: '' };
  const { differentialAmps, thresholdAmps } = line.phases[phase];
  return {
    lead: `Phase ${context.site.phaseLetters[phase]} at ${percentOfMarkText(utilisation)} of its threshold`,
    rest:
      `${lasting === '' ? '' : ` for ${lasting}`}: ${againstText({ differentialAmps, thresholdAmps })}.` +
      chargingWords(line),
  };
}

/** Said only where charging takes a good part of the pickup: then it explains most of what is seen. */
function chargingWords(line: Pick<LineSummary, 'chargingAmps' | 'pickupAmps'>): string {
  if (line.chargingAmps === null || line.pickupAmps === null || line.pickupAmps <= 0) return '';
  const share = line.chargingAmps / line.pickupAmps;
  return share < 0.4 ? '' : ` Charging alone takes ${percentText(share)} of the pickup.`;
}

function risingReason(line: LineSummary, warning: Warning | undefined, context: WordsContext): ReasonWords {
  const creep =
    line.creep.find((one) => one.verdict === 'creep') ??
    (warning?.cause.basis === 'creep' ? warning.cause.creep : undefined);
  if (creep === undefined) return { lead: 'A standing level is rising.', rest: '' };
  return {
    lead: `Phase ${context.site.phaseLetters[creep.phase]} rises ${slopeWords(creep)}.`,
    rest: ` ${creepForecastWords(creep, line.pickupAmps, context)}`,
  };
}

function blindReason(
  line: LineSummary,
  warning: Warning | undefined,
  { context, lasting }: { context: WordsContext; lasting: string },
): ReasonWords {
  const since = lasting === '' ? '' : ` Blind for ${lasting}.`;
  if (warning !== undefined) {
    const words = causeWords(warning.cause, context);
    return { lead: words.lead, rest: `${words.rest}${since}` };
  }
  return { lead: line.reason ?? 'The differential cannot be computed.', rest: since };
}

/** The differential and what it stands against; a scheme with a region has no threshold to name. */
function againstText({
  differentialAmps,
  thresholdAmps,
}: {
  differentialAmps: number | null;
  thresholdAmps: number | null;
}): string {
  if (thresholdAmps === null) return `a differential current of ${ampsText(differentialAmps)}`;
  return `${ampsText(differentialAmps)} against ${ampsText(thresholdAmps)}`;
}
