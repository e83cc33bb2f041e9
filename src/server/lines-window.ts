import { z } from 'zod';
import { rungSchema } from '../contract/lines';

const instant = z.iso.datetime({
  offset: true,
  error: 'Give an instant with its offset, such as 2026-03-01T10:00:00Z.',
});
const inOrder = {
  check: ({ from, to }: { from: string; to: string }) => Date.parse(from) < Date.parse(to),
  says: { message: 'The window begins before it ends.', path: ['to'] },
};

/** The window of a raw read, from the query of an address. */
export const windowSchema = z.object({ from: instant, to: instant }).refine(inOrder.check, inOrder.says);
export const levelWindowSchema = z
  .object({ from: instant, to: instant, rung: rungSchema })
  .refine(inOrder.check, inOrder.says);

export const windowOf = ({ from, to }: { from: string; to: string }) => ({
  from: new Date(from),
  to: new Date(to),
});
