import { FEED_SORTS, type FeedListState, type FeedSort } from '../../view/feed-rows';

interface FeedFilterProps {
  state: FeedListState;
  shown: number;
  known: number;
  onChange: (state: FeedListState) => void;
}

const SORTS: Readonly<Record<FeedSort, string>> = {
  worst: 'longest silence',
  line: 'line',
  gaps: 'most gaps',
  missed: 'most missed',
};

/** A plain form: without scripts it asks the server for the same list. */
export function FeedFilter({ state, shown, known, onChange }: FeedFilterProps) {
  return (
    <form
      method="GET"
      action="/feeds"
      role="search"
      className="mb-2 flex flex-wrap items-end gap-x-3 gap-y-2"
    >
      <div className="max-sm:w-full">
        <label htmlFor="feed-search" className="block text-caption text-ink-2">
          Line, terminal, substation or state
        </label>
        <input
          id="feed-search"
          type="search"
          name="q"
          autoComplete="off"
          value={state.search}
          onChange={(event) => onChange({ ...state, search: event.target.value })}
          className="field mt-0.5 w-64 max-w-full max-sm:w-full"
        />
      </div>
      <div>
        <label htmlFor="feed-sort" className="block text-caption text-ink-2">
          First
        </label>
        <select
          id="feed-sort"
          name="sort"
          value={state.sort}
          onChange={(event) =>
            onChange({ ...state, sort: FEED_SORTS.find((sort) => sort === event.target.value) ?? 'worst' })
          }
          className="field mt-0.5"
        >
          {FEED_SORTS.map((sort) => (
            <option key={sort} value={sort}>
              {SORTS[sort]}
            </option>
          ))}
        </select>
      </div>
      <noscript>
        <button type="submit" className="button">
          Show
        </button>
      </noscript>
      <p className="pb-1 text-ink-2" role="status">
        {shown === known ? `${known} terminals` : `${shown} of ${known} terminals`}
      </p>
    </form>
  );
}
