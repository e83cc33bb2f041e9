interface Props {
  /** what is being fetched, in the middle of a sentence: "the last hour" */
  readonly what: string;
  readonly error: Error | null;
  readonly onTryAgain: () => void;
}

/** In place of what is not there yet: that it is coming, or why it did not come and a way to try again. */
export function FetchState({ what, error, onTryAgain }: Props) {
  if (error === null)
    return (
      <p role="status" className="text-ink-2">
        Fetching {what} …
      </p>
    );
  return (
    <div role="alert">
      <p className="mb-2">
        Tareline could not fetch {what}. {error.message}
      </p>
      <button type="button" className="button" onClick={onTryAgain}>
        Try again
      </button>
    </div>
  );
}
