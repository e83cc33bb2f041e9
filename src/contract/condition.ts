import { z } from 'zod';

/** A line's condition. "not evaluated" is apart from the ladder, as blind is: nothing is known, so nothing is claimed. */
export const CONDITIONS = [
  'over',
  'near',
  'rising',
  'blind',
  'not evaluated',
  'out of service',
  'settled',
] as const;
export const conditionSchema = z.enum(CONDITIONS);
export type Condition = z.infer<typeof conditionSchema>;
