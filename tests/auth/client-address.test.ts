import { describe, expect, it } from 'vitest';
import { addressBlock, clientAddress } from '../../src/auth/client-address';

describe('the client address', () => {
  const seen = { socketAddress: '::ffff:10.0.0.7', forwardedFor: '203.0.113.9, 198.51.100.4' };

  it('is the socket’s own where no proxy is trusted, whatever is claimed', () => {
    expect(clientAddress({ ...seen, trustProxy: false })).toBe('10.0.0.7');
  });
  it('is the hop that the trusted proxy wrote, not the ones before it', () => {
    expect(clientAddress({ ...seen, trustProxy: true })).toBe('198.51.100.4');
  });
  it('falls back to the socket when the proxy wrote none', () => {
    expect(clientAddress({ ...seen, forwardedFor: undefined, trustProxy: true })).toBe('10.0.0.7');
  });
});

describe('the block that attempts are counted by', () => {
  it.each([
    ['192.0.2.1', '192.0.2.1'],
    ['2001:db8:0:1::5', '2001:db8:0:1::/64'],
    ['2001:DB8:0:1:ffff:ffff:ffff:ffff', '2001:db8:0:1::/64'],
    ['2001:db8::1', '2001:db8:0:0::/64'],
    ['::1', '0:0:0:0::/64'],
    ['fe80::1%eth0', 'fe80:0:0:0::/64'],
  ])('of %s is %s', (address, block) => expect(addressBlock(address)).toBe(block));
});
