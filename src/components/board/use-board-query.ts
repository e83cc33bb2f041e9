import { useCallback, useEffect, useState } from 'react';
import { boardSearch, parseBoardQuery, type BoardQuery } from '../../view/board-query';

export interface BoardAddress {
  readonly query: BoardQuery;
  /** a choice: a step that the back button takes back */
  choose(change: Partial<BoardQuery>): void;
  /** typing: the address follows without a step for each letter */
  type(change: Partial<BoardQuery>): void;
}

/** The Board's query, which lives in the address; the server has read the same one. */
export function useBoardQuery(initialSearch: string): BoardAddress {
  const [query, setQuery] = useState(() => parseBoardQuery(initialSearch));
  useEffect(() => {
    const follow = () => setQuery(parseBoardQuery(window.location.search));
    window.addEventListener('popstate', follow);
    return () => window.removeEventListener('popstate', follow);
  }, []);
  const choose = useCallback(
    (change: Partial<BoardQuery>) => {
      const next = { ...query, ...change };
      setQuery(next);
      window.history.pushState(null, '', `${window.location.pathname}${boardSearch(next)}`);
    },
    [query],
  );
  const type = useCallback(
    (change: Partial<BoardQuery>) => {
      const next = { ...query, ...change };
      setQuery(next);
      window.history.replaceState(null, '', `${window.location.pathname}${boardSearch(next)}`);
    },
    [query],
  );
  return { query, choose, type };
}
