import { expect, it } from 'vitest';
import { refusalListAddress, refusalListState, visiblePayload } from '../../src/view/feed-refusals';

it('a page of kept messages is found again by its address', () => {
  const state = { reason: 'not JSON', before: 120 } as const;
  const address = refusalListAddress(state);
  expect(address).toBe('/feeds?reason=not+JSON&before=120#kept');
  expect(refusalListState(new URL(address, 'https://tareline.example').searchParams)).toEqual(state);
});

it('an address that asks for nonsense shows the newest of every reason', () => {
  expect(refusalListState(new URLSearchParams('reason=boredom&before=-3'))).toEqual({});
  expect(refusalListAddress({ reason: undefined, before: undefined })).toBe('/feeds#kept');
});

it('characters that would hide or turn text around stand as their code', () => {
  expect(visiblePayload('a\u0000b\u202ec\td\n')).toBe('a\\u0000b\\u202ec\td\n');
});
