import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import {
  DONE_MOST,
  followUpInFullSchema,
  followUpListSchema,
  type FollowUpInFull,
} from '../../contract/follow-ups';
import type { FollowUp } from '../../contract/standing';
import type { FollowUpDone } from '../../contract/works';
import { apiRequest, RequestRefused } from '../shell/api-request';

const REFETCH_MS = 60_000;
const KEY = ['follow-ups'];

export interface NewFollowUp {
  readonly line: string;
  readonly phase: FollowUp['phase'];
  readonly cause: FollowUp['cause'];
  readonly due: string | null;
  readonly note: string;
}

interface Listed {
  readonly open: readonly FollowUpInFull[];
  /** those done last, newest first */
  readonly done: readonly FollowUpInFull[];
}

export interface FollowUps extends Listed {
  /** what was done last, for whoever listens: a sentence */
  readonly told: string | undefined;
  /** where the work that was just recorded can be seen before and after */
  readonly compare: string | undefined;
  add(opened: NewFollowUp): Promise<void>;
  /** throws `RequestRefused` with the fields that are wrong */
  end(followUp: FollowUp, done: FollowUpDone): Promise<void>;
}

/** The open follow-ups and those done last, as the page brought them and as they are asked for anew each minute. */
export function useFollowUps(initial: Listed): FollowUps {
  const client = useQueryClient();
  const [told, setTold] = useState<string>();
  const [compare, setCompare] = useState<string>();
  const { data } = useQuery({
    queryKey: KEY,
    queryFn: async ({ signal }): Promise<Listed> => {
      const [open, done] = await Promise.all([
        fetchFollowUps('state=open', signal),
        fetchFollowUps(`state=done&limit=${DONE_MOST}`, signal),
      ]);
      return { open, done };
    },
    initialData: initial,
    staleTime: REFETCH_MS,
    refetchInterval: REFETCH_MS,
    retry: false,
  });
  const asked = () => client.invalidateQueries({ queryKey: KEY });
  return {
    ...data,
    told,
    compare,
    async add(opened) {
      const kept = await apiRequest('/api/follow-ups', {
        answer: followUpInFullSchema,
        method: 'POST',
        body: opened,
      });
      setTold(`Follow-up opened for ${kept.lineName}.`);
      await asked();
    },
    async end(followUp, done) {
      setCompare(undefined);
      try {
        await apiRequest(`/api/follow-ups/${followUp.id}/done`, {
          answer: followUpInFullSchema,
          method: 'POST',
          body: done,
        });
        setTold(`Follow-up for ${followUp.lineName} done.`);
        if (done.work !== null) setCompare(`/lines/${followUp.line}/compare?at=${done.work.doneOn}`);
      } catch (error) {
        // ended by somebody else meanwhile: the list shows it
        if (!(error instanceof RequestRefused) || error.status !== 409) throw error;
        setTold(error.message);
      }
      await asked();
    },
  };
}

const fetchFollowUps = async (query: string, signal: AbortSignal): Promise<FollowUpInFull[]> =>
  (await apiRequest(`/api/follow-ups?${query}`, { answer: followUpListSchema, signal })).followUps;
