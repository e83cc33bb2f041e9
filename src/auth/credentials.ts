import { z } from 'zod';
import { PASSWORD_LENGTH } from './passwords';

export const emailSchema = z
  .string('Give your e-mail address.')
  .trim()
  .toLowerCase()
  .min(1, 'Give your e-mail address.')
  .max(254, 'An e-mail address has at most 254 characters.')
  .pipe(z.email('This is not an e-mail address.'));

/** POST /api/sign-in, and the form of the sign-in page. */
export const credentialsSchema = z.object({
  email: emailSchema,
  password: z
    .string('Give your password.')
    .min(1, 'Give your password.')
    .max(PASSWORD_LENGTH.most, `A password has at most ${PASSWORD_LENGTH.most} characters.`),
});
export type Credentials = z.infer<typeof credentialsSchema>;
