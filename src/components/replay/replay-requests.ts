import {
  proposalSchema,
  replayStartedSchema,
  replayStateSchema,
  type Proposal,
  type ReplayRequest,
  type ReplayState,
} from '../../contract/replay';
import { apiRequest } from '../shell/api-request';

const line = (key: string): string => `/api/lines/${encodeURIComponent(key)}`;
const replay = (id: string): string => `/api/replays/${encodeURIComponent(id)}`;

export const startReplay = (key: string, body: ReplayRequest): Promise<{ id: string }> =>
  apiRequest(`${line(key)}/replay`, { answer: replayStartedSchema, method: 'POST', body });

export const fetchReplay = (id: string, signal?: AbortSignal): Promise<ReplayState> =>
  apiRequest(replay(id), { answer: replayStateSchema, ...(signal && { signal }) });

export const cancelReplay = (id: string): Promise<ReplayState> =>
  apiRequest(replay(id), { answer: replayStateSchema, method: 'DELETE' });

export const keepProposal = (key: string, body: { replay: string; note: string }): Promise<Proposal> =>
  apiRequest(`${line(key)}/proposals`, { answer: proposalSchema, method: 'POST', body });
