import { useCallback, useEffect, useState } from 'react';
import { marginSearch, parseMarginAddress, type MarginAddress } from '../../view/margin-query';

export interface MarginAddressState {
  readonly address: MarginAddress;
  /** a choice: a step that the back button takes back */
  choose(change: Partial<MarginAddress>): void;
  /** typing: the address follows without a step for each letter */
  type(change: Partial<MarginAddress>): void;
}

/** What the page shows, which lives in the address; the server has read the same one. */
export function useMarginAddress(initialSearch: string): MarginAddressState {
  const [address, setAddress] = useState(() => parseMarginAddress(initialSearch));
  useEffect(() => {
    const follow = () => setAddress(parseMarginAddress(window.location.search));
    window.addEventListener('popstate', follow);
    return () => window.removeEventListener('popstate', follow);
  }, []);
  const change = useCallback((next: MarginAddress, write: 'pushState' | 'replaceState') => {
    setAddress(next);
    window.history[write](null, '', `${window.location.pathname}${marginSearch(next)}`);
  }, []);
  const choose = useCallback(
    (part: Partial<MarginAddress>) => change({ ...address, ...part }, 'pushState'),
    [address, change],
  );
  const type = useCallback(
    (part: Partial<MarginAddress>) => change({ ...address, ...part }, 'replaceState'),
    [address, change],
  );
  return { address, choose, type };
}
