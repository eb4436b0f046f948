import net from 'node:net';

/**
 * What counts as one address for limits: an IPv4 address, or the /64 network of an IPv6 address, as that is what one
 * subscriber commonly holds (common practice).
 */
export function addressBucket(ip: string): string {
  const mapped = /^::ffff:(\d+\.\d+\.\d+\.\d+)$/i.exec(ip)?.[1];
  if (mapped !== undefined) return mapped;
  if (!net.isIPv6(ip)) return ip;
  const [head = '', tail = ''] = (ip.split('%')[0] ?? '').split('::');
  const headGroups = head === '' ? [] : head.split(':');
  const tailGroups = tail === '' ? [] : tail.split(':');
  const zeros = Array.from({ length: Math.max(0, 8 - headGroups.length - tailGroups.length) }, () => '0');
  const groups = [...headGroups, ...zeros, ...tailGroups].slice(0, 4);
  return `${groups.map((group) => Number.parseInt(group, 16).toString(16)).join(':')}::/64`;
}
