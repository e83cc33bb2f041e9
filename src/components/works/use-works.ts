import { useState } from 'react';
import { workListSchema, workSchema, type NewWork, type Work } from '../../contract/works';
import { apiRequest, RequestRefused } from '../shell/api-request';

export interface Works {
  readonly list: readonly Work[];
  /** what was done last, for whoever listens: a sentence */
  readonly told: string | undefined;
  readonly problem: string | undefined;
  /** throws `RequestRefused` with the fields that are wrong */
  add(work: NewWork): Promise<void>;
  withdraw(work: Work): Promise<void>;
}

/** The recorded works of a line, as the page brought them and as they are after each change. */
export function useWorks(line: string, initial: readonly Work[]): Works {
  const [list, setList] = useState(initial);
  const [told, setTold] = useState<string>();
  const [problem, setProblem] = useState<string>();
  const renew = async () =>
    setList((await apiRequest(`/api/works?line=${line}`, { answer: workListSchema })).works);
  return {
    list,
    told,
    problem,
    async add(work) {
      await apiRequest('/api/works', { answer: workSchema, method: 'POST', body: work });
      setTold('The work is recorded. Trends are taken since it from the next hourly look on.');
      await renew();
    },
    async withdraw(work) {
      setProblem(undefined);
      try {
        await apiRequest(`/api/works/${work.id}/withdrawn`, { answer: workSchema, method: 'POST', body: {} });
        setTold('The record is withdrawn.');
      } catch (error) {
        setProblem(error instanceof RequestRefused ? error.message : 'The record could not be withdrawn.');
      }
      await renew();
    },
  };
}
