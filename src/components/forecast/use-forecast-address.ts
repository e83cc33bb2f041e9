import { useCallback, useEffect, useState } from 'react';
import { forecastSearch, parseForecastAddress, type ForecastAddress } from '../../view/forecast-query';

export interface ForecastAddressState {
  readonly address: ForecastAddress;
  /** a choice: a step that the back button takes back */
  choose(change: Partial<ForecastAddress>): void;
  /** typing: the address follows without a step for each letter */
  type(change: Partial<ForecastAddress>): void;
}

/** What the page shows, which lives in the address; the server has read the same one. */
export function useForecastAddress(initialSearch: string): ForecastAddressState {
  const [address, setAddress] = useState(() => parseForecastAddress(initialSearch));
  useEffect(() => {
    const follow = () => setAddress(parseForecastAddress(window.location.search));
    window.addEventListener('popstate', follow);
    return () => window.removeEventListener('popstate', follow);
  }, []);
  const change = useCallback(
    (part: Partial<ForecastAddress>, write: 'pushState' | 'replaceState') => {
      const next = { ...address, ...part };
      setAddress(next);
      window.history[write](null, '', `${window.location.pathname}${forecastSearch(next)}`);
    },
    [address],
  );
  return {
    address,
    choose: useCallback((part) => change(part, 'pushState'), [change]),
    type: useCallback((part) => change(part, 'replaceState'), [change]),
  };
}
