import { useEffect, useState } from 'react';
import { readChartInk } from './chart-ink';
import type { ChartInk } from './chart-ink';

/** The theme's colours, read anew when the theme changes: by the button or by the system. */
export function useChartInk(): ChartInk | undefined {
  const [ink, setInk] = useState<ChartInk>();
  useEffect(() => {
    const root = document.documentElement;
    const read = () => setInk(readChartInk(root));
    read();
    const watched = new MutationObserver(read);
    watched.observe(root, { attributes: true, attributeFilter: ['data-theme'] });
    const system = matchMedia('(prefers-color-scheme: dark)');
    system.addEventListener('change', read);
    return () => {
      watched.disconnect();
      system.removeEventListener('change', read);
    };
  }, []);
  return ink;
}
