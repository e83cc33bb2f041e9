import { hash, verify } from '@node-rs/argon2';

const ARGON2ID = 2;
const COST = { algorithm: ARGON2ID, memoryCost: 19 * 1024, timeCost: 2, parallelism: 1 } as const;

export const PASSWORD_LENGTH = { least: 12, most: 200 } as const;
export const PASSWORD_RULES = `At least ${PASSWORD_LENGTH.least} characters, and not your e-mail address. A few unrelated words make a good one.`;

// hash of a password that was drawn at random and thrown away: it makes an unknown person cost what a known one does
const DECOY =
  '$argon2id$v=19$m=19456,t=2,p=1$cNHovuq2znRImu3i/Slflg$elfIMgrED1C2BmsN/09F/+zdoH6YSyJUvdtWs2u0y/o';

export const hashPassword = (password: string): Promise<string> => hash(password, COST);

/** Whether the password is the one hashed. Takes as long when there is no hash to compare with. */
export async function isPassword(
  password: string,
  passwordHash: string | null | undefined,
): Promise<boolean> {
  const known = passwordHash ?? undefined;
  const matches = await verify(known ?? DECOY, password);
  return matches && known !== undefined;
}

/** What is wrong with a new password, as a sentence; undefined when it will do. */
export function passwordProblem(password: string, email: string): string | undefined {
  const { least, most } = PASSWORD_LENGTH;
  if ([...password].length < least) return `The password has fewer than ${least} characters.`;
  if (password.length > most) return `The password has more than ${most} characters.`;
  if (new Set(password).size < 4) return 'The password repeats too few different characters.';
  if (password.toLowerCase().includes(email.toLowerCase())) return 'The password holds your e-mail address.';
  return undefined;
}
