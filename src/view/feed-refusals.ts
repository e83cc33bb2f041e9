import { REFUSAL_REASONS, type RefusalReason } from '../contract/feed';

/** How many kept messages one page shows. */
export const REFUSALS_A_PAGE = 25;

/** Which kept messages a page shows, as its address keeps it. */
export interface RefusalListState {
  readonly reason: RefusalReason | undefined;
  /** only messages older than this one */
  readonly before: number | undefined;
}

export function refusalListState(parameters: URLSearchParams): RefusalListState {
  const before = Number(parameters.get('before') ?? NaN);
  return {
    reason: REFUSAL_REASONS.find((reason) => reason === parameters.get('reason')),
    before: Number.isSafeInteger(before) && before > 0 ? before : undefined,
  };
}

/** The address of the page in another state; `kept` is the part of the page that shows the messages. */
export function refusalListAddress({ reason, before }: RefusalListState): string {
  const parameters = new URLSearchParams();
  if (reason !== undefined) parameters.set('reason', reason);
  if (before !== undefined) parameters.set('before', String(before));
  const query = parameters.toString();
  return `/feeds${query === '' ? '' : `?${query}`}#kept`;
}

/** A payload for the eye: characters that a screen would swallow stand as their code. */
export function visiblePayload(payload: string): string {
  return payload.replaceAll(
    /[\u0000-\u0008\u000b-\u001f\u007f-\u009f\u200b-\u200f\u2028-\u202e\u2066-\u2069\ufeff]/g,
    (character) => {
      const code = character.codePointAt(0)!.toString(16).padStart(4, '0');
      return `\\u${code}`;
    },
  );
}
