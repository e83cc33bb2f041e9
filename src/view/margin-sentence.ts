/** How many phases there are findings of, and how many of them ask for something. */
export interface MarginCounts {
  readonly phases: number;
  readonly beyond: number;
  readonly creeping: number;
  readonly withinMargin: number;
}

const NUMBERS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten'];

/** Small counts in words, as a sentence has them. */
export const countWords = (count: number): string => NUMBERS[count] ?? count.toLocaleString('en-GB');

export const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

/** The head of the Margins page: what is beyond, what creeps, and the size of the fleet. */
export function marginSentence({ phases, beyond, creeping, withinMargin }: MarginCounts) {
  return {
    whole: `${phases.toLocaleString('en-GB')} standing levels`,
    beyond: beyond === 0 ? undefined : `${countWords(beyond)} beyond the near mark`,
    creeping: creeping === 0 ? undefined : `${countWords(creeping)} creeping towards it`,
    rest:
      beyond + creeping === 0
        ? 'none is beyond the near mark and none creeps towards it'
        : withinMargin === 0
          ? undefined
          : `${countWords(withinMargin)} ${withinMargin === 1 ? 'rises' : 'rise'} within margin`,
  };
}
