import { lineCompositionSchema } from '../../contract/composition';
import type { LineComposition } from '../../contract/composition';
import type { TrendWindow } from '../../view/trend-span';
import { apiRequest } from '../shell/api-request';

export function fetchComposition(
  { key, signal }: { key: string; signal: AbortSignal },
  { fromMs, toMs }: TrendWindow,
): Promise<LineComposition> {
  const query = new URLSearchParams({
    from: new Date(fromMs).toISOString(),
    to: new Date(toMs).toISOString(),
  });
  const address = `/api/lines/${encodeURIComponent(key)}/composition`;
  return apiRequest(`${address}?${query}`, { answer: lineCompositionSchema, signal });
}
