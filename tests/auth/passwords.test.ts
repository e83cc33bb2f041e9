import { describe, expect, it } from 'vitest';
import { hashPassword, isPassword, passwordProblem } from '../../src/auth/passwords';

describe('a password', () => {
  it('is kept as argon2id of the stated cost and known again', async () => {
    const kept = await hashPassword('four unrelated words');
    expect(kept).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    expect(await isPassword('four unrelated words', kept)).toBe(true);
    expect(await isPassword('four unrelated word', kept)).toBe(false);
  });
  it('never matches where there is none to compare with', async () => {
    expect(await isPassword('anything', null)).toBe(false);
    expect(await isPassword('anything', undefined)).toBe(false);
  });
  it.each([
    ['elevenchars', 'The password has fewer than 12 characters.'],
    ['abababababababab', 'The password repeats too few different characters.'],
    ['ada@example.org!', 'The password holds your e-mail address.'],
    ['abcd'.repeat(51), 'The password has more than 200 characters.'],
  ])('like %s is refused with the reason', (password, problem) => {
    expect(passwordProblem(password, 'ada@example.org')).toBe(problem);
  });
  it('of twelve characters will do', () => {
    expect(passwordProblem('twelve chars', 'ada@example.org')).toBeUndefined();
  });
});
