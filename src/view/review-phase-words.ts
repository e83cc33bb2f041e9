import { PHASES } from './phase';
import type { PhaseName } from './phase';
import { listed } from './line-words';
import type { PhaseLetters } from './site-custom';

/** Sentences that hold for some of the phases: as they are where one holds for all three, else each with whose it is. */
export function phaseSentences(
  sentenceOf: (phase: PhaseName) => string | undefined,
  letters: PhaseLetters,
): string[] {
  const holders = new Map<string, PhaseName[]>();
  for (const phase of PHASES) {
    const sentence = sentenceOf(phase);
    if (sentence !== undefined) holders.set(sentence, [...(holders.get(sentence) ?? []), phase]);
  }
  return [...holders].map(([sentence, phases]) =>
    phases.length === PHASES.length
      ? sentence
      : `${phases.length === 1 ? 'Phase' : 'Phases'} ${listed(phases.map((phase) => letters[phase]))}: ${sentence}`,
  );
}
