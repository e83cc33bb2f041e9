import type { Condition } from '../contract/condition';

/** What needs a person's eye, worst first. Blind is apart from the ladder of figures, and still asks for an eye. */
export const ATTENTION: readonly Condition[] = ['over', 'near', 'rising', 'blind'];

/** The order of "worst first" for every condition. */
export const WORST_FIRST: readonly Condition[] = [...ATTENTION, 'not evaluated', 'out of service', 'settled'];

export const severityRank = (condition: Condition): number => WORST_FIRST.indexOf(condition);

export const needsAttention = (condition: Condition): boolean => ATTENTION.includes(condition);

/** The utility classes in which a condition's word and shape are written; colour never stands alone. */
export const CONDITION_INK: Readonly<Record<Condition, string>> = {
  over: 'text-over',
  near: 'text-near',
  rising: 'text-rising',
  blind: 'text-blind',
  'not evaluated': 'text-ink-2',
  'out of service': 'text-ink-2',
  settled: 'text-ink',
};

/** What a condition means, in one sentence, for a title or a legend. */
export const CONDITION_MEANING: Readonly<Record<Condition, string>> = {
  over: 'The differential current has reached the threshold.',
  near: 'A phase has come up to the near mark.',
  rising: 'A standing level is climbing significantly.',
  blind: 'The differential current cannot be computed at present.',
  'not evaluated': 'Tareline has no settings for this line, or cannot judge its scheme yet.',
  'out of service': 'The line is out of service, by the register or because its breakers are open.',
  settled: 'Every phase stands where it should.',
};
