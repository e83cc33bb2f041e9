import { useEffect, useState } from 'react';

/** Whether the page is as narrow as a phone held upright: charts then carry fewer ticks. */
export function useNarrow(): boolean {
  const [narrow, setNarrow] = useState(false);
  useEffect(() => {
    const query = matchMedia('(max-width: 39.99rem)');
    const read = () => setNarrow(query.matches);
    read();
    query.addEventListener('change', read);
    return () => query.removeEventListener('change', read);
  }, []);
  return narrow;
}
