/**
 * The address that a request came from. Behind a trusted proxy that is the last hop of X-Forwarded-For, the only
 * one that the proxy itself wrote; everything before it is the client's own word.
 */
export function clientAddress(seen: {
  socketAddress: string | undefined;
  forwardedFor: string | readonly string[] | undefined;
  trustProxy: boolean;
}): string {
  const hops = [seen.forwardedFor ?? []].flat().join(',').split(',');
  const lastHop = hops.at(-1)?.trim();
  const address = seen.trustProxy && lastHop ? lastHop : (seen.socketAddress ?? 'unknown');
  return address.replace(/^::ffff:(?=\d+\.)/, '').slice(0, 64);
}

/** What attempts are counted by: an IPv4 address, or the /64 network that one IPv6 subscriber holds whole. */
export function addressBlock(address: string): string {
  if (!address.includes(':')) return address;
  const [head = '', tail] = address.split('%', 1)[0]!.split('::');
  const left = head.split(':').filter(Boolean);
  const right = (tail ?? '').split(':').filter(Boolean);
  const zeros = tail === undefined ? 0 : Math.max(0, 8 - left.length - right.length);
  const groups = [...left, ...Array<string>(zeros).fill('0'), ...right].slice(0, 4);
  return `${groups.map((group) => group.toLowerCase().replace(/^0+(?=.)/, '')).join(':')}::/64`;
}
