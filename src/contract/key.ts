import { z } from 'zod';

/** A register key as it stands in topics and addresses: lower-case letters, digits and hyphens, 1 to 40 of them. */
export const keySchema = z
  .string()
  .regex(/^[a-z0-9-]{1,40}$/, 'A key is 1 to 40 lower-case letters, digits or hyphens.');
