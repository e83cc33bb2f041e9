import { useState } from 'react';
import type { Problem } from '../../contract/problem';
import { RequestRefused } from './api-request';

export interface Sending {
  readonly sending: boolean;
  /** settles with what is wrong: fields where the endpoint named any, else one problem without a field; none when it was taken */
  send(work: () => Promise<void>): Promise<Problem['fields'] | undefined>;
}

/** Sends what a form holds once at a time. After it was taken the form is gone, and nothing of it is touched any more. */
export function useSending(failed: string): Sending {
  const [sending, setSending] = useState(false);
  return {
    sending,
    async send(work) {
      setSending(true);
      try {
        await work();
        return undefined;
      } catch (error) {
        setSending(false);
        if (error instanceof RequestRefused && error.fields.length > 0) return error.fields;
        return [{ field: '', problem: error instanceof Error ? error.message : failed }];
      }
    },
  };
}

/** What a schema found wrong, as an endpoint would say it. */
export const fieldsOf = (
  issues: readonly { readonly path: readonly PropertyKey[]; readonly message: string }[],
): Problem['fields'] =>
  issues.map(({ path, message }) => ({ field: path.map(String).join('.'), problem: message }));
