import type { FeedHealth } from '../contract/feed-health';
import type { FeedRow, FeedStanding } from './feed-rows';

/** How the feed stands, in the words of the page. */

/** The standing as a shape and a word: never a tint alone. */
export const STANDING_SHAPES: Readonly<Record<FeedStanding, string>> = {
  'never heard': '◌',
  offline: '✕',
  silent: '◌',
  heard: '●',
  resting: '–',
};

export function standingText({ standing, presence }: FeedRow): string {
  switch (standing) {
    case 'never heard':
      return presence === 'online' ? 'online, never heard' : 'never heard';
    case 'offline':
      return 'offline';
    case 'silent':
      return presence === 'online' ? 'online but silent' : 'silent';
    case 'heard':
      return presence === 'offline' ? 'heard, said it goes offline' : presence === null ? 'heard' : 'online';
    case 'resting':
      return 'not expected';
  }
}

/** The first sentence of the page, in a part that is as it should be and one that is not. */
export function feedSentence(counts: Readonly<Record<FeedStanding, number>>): {
  well: string;
  ill: string | undefined;
} {
  const ill = counts['never heard'] + counts.offline + counts.silent;
  const expected = ill + counts.heard;
  if (expected === 0) return { well: 'No terminal is expected to be heard', ill: undefined };
  if (counts.heard === 0)
    return {
      well: 'No terminal is heard',
      ill: expected === 1 ? 'The only one is silent' : `All ${expected} are silent`,
    };
  const well =
    ill === 0
      ? expected === 1
        ? 'The one terminal is heard'
        : `All ${expected} terminals are heard`
      : `${counts.heard} of ${expected} terminals are heard`;
  return { well, ill: ill === 0 ? undefined : ill === 1 ? 'One is silent' : `${ill} are silent` };
}

/** "3 gaps, 41 missed" */
export function gapsText({ gapCount, missedCount }: Pick<FeedRow, 'gapCount' | 'missedCount'>): string {
  if (gapCount === 0) return 'none';
  return `${gapCount} ${gapCount === 1 ? 'gap' : 'gaps'}, ${missedCount} missed`;
}

/** "17,060 messages refused so far" */
export function refusedText(refusals: FeedHealth['refusals']): string {
  const total = refusals.reduce((sum, { count }) => sum + count, 0);
  if (total === 0) return 'No message refused so far';
  return total === 1
    ? 'One message refused so far'
    : `${total.toLocaleString('en-GB')} messages refused so far`;
}
