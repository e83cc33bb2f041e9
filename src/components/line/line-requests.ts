import { lineDetailSchema, levelListSchema, snapshotListSchema } from '../../contract/lines';
import type { LevelList, LineDetail, Rung, Snapshot } from '../../contract/lines';
import { reviewCloudSchema } from '../../contract/review';
import type { ReviewCloud } from '../../contract/review';
import type { TrendWindow } from '../../view/trend-span';
import { apiRequest } from '../shell/api-request';

/** Answers of one window at most; an hour of snapshots fits into a few. */
const PAGES_MOST = 12;

interface LineRequest {
  readonly key: string;
  readonly signal: AbortSignal;
}

const address = (key: string): string => `/api/lines/${encodeURIComponent(key)}`;
const instant = (atMs: number): string => new Date(atMs).toISOString();

export const fetchLineDetail = ({ key, signal }: LineRequest): Promise<LineDetail> =>
  apiRequest(address(key), { answer: lineDetailSchema, signal });

export function fetchLevels(
  { key, signal }: LineRequest,
  { fromMs, toMs }: TrendWindow,
  rung: Rung,
): Promise<LevelList> {
  const query = new URLSearchParams({ from: instant(fromMs), to: instant(toMs), rung });
  return apiRequest(`${address(key)}/levels?${query}`, { answer: levelListSchema, signal });
}

export function fetchReviewCloud(
  { key, signal }: LineRequest,
  { fromMs, toMs }: TrendWindow,
): Promise<ReviewCloud> {
  const query = new URLSearchParams({ from: instant(fromMs), to: instant(toMs) });
  return apiRequest(`${address(key)}/review?${query}`, { answer: reviewCloudSchema, signal });
}

/** All snapshots of a window, oldest first, over as many answers as it takes. */
export async function fetchSnapshots(
  { key, signal }: LineRequest,
  { fromMs, toMs }: TrendWindow,
): Promise<Snapshot[]> {
  const found: Snapshot[] = [];
  let nextMs = fromMs;
  for (let page = 0; page < PAGES_MOST; page += 1) {
    const query = new URLSearchParams({ from: instant(nextMs), to: instant(toMs) });
    const list = await apiRequest(`${address(key)}/snapshots?${query}`, {
      answer: snapshotListSchema,
      signal,
    });
    found.push(...list.snapshots);
    const last = list.snapshots[list.snapshots.length - 1];
    if (!list.truncated || last === undefined || Date.parse(last.at) <= nextMs) break;
    nextMs = Date.parse(last.at);
  }
  return found;
}
