import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { followUpListSchema } from '../../contract/follow-ups';
import { followUpSchema, type FollowUp } from '../../contract/standing';
import type { FollowUpDone } from '../../contract/works';
import { apiRequest, RequestRefused } from '../shell/api-request';

const REFETCH_MS = 60_000;
const KEY = ['follow-ups', 'open'];

export interface NewFollowUp {
  readonly line: string;
  readonly phase: FollowUp['phase'];
  readonly cause: FollowUp['cause'];
  readonly due: string | null;
  readonly note: string;
}

export interface FollowUps {
  readonly open: readonly FollowUp[];
  /** what was done last, for whoever listens: a sentence */
  readonly told: string | undefined;
  /** where the work that was just recorded can be seen before and after */
  readonly compare: string | undefined;
  add(opened: NewFollowUp): Promise<void>;
  /** throws `RequestRefused` with the fields that are wrong */
  end(followUp: FollowUp, done: FollowUpDone): Promise<void>;
}

/** The open follow-ups, as the page brought them and as they are asked for anew each minute. */
export function useFollowUps(initial: readonly FollowUp[]): FollowUps {
  const client = useQueryClient();
  const [told, setTold] = useState<string>();
  const [compare, setCompare] = useState<string>();
  const { data } = useQuery({
    queryKey: KEY,
    queryFn: async ({ signal }) =>
      (await apiRequest('/api/follow-ups?state=open', { answer: followUpListSchema, signal })).followUps,
    initialData: [...initial],
    staleTime: REFETCH_MS,
    refetchInterval: REFETCH_MS,
    retry: false,
  });
  const asked = () => client.invalidateQueries({ queryKey: KEY });
  return {
    open: data,
    told,
    compare,
    async add(opened) {
      const kept = await apiRequest('/api/follow-ups', {
        answer: followUpSchema,
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
          answer: followUpSchema,
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
