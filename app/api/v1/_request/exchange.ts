/** What is known of a request before anything of it is read. */
import { isIP } from 'node:net';
import { newRequestId } from '@/lib/calls/call-id';

export interface Exchange {
  readonly requestId: string;
  readonly clientRequestId: string | null;
  readonly address: string | null;
  readonly startedAt: number;
  /** Milliseconds since the request arrived. */
  elapsed(): number;
}

export function beginExchange(request: Request): Exchange {
  const start = performance.now();
  const clientRequestId = request.headers.get('x-request-id');
  return {
    requestId: newRequestId(),
    clientRequestId: clientRequestId && /^[\x21-\x7e]{1,128}$/.test(clientRequestId) ? clientRequestId : null,
    address: addressOf(request),
    startedAt: Date.now(),
    elapsed: () => performance.now() - start,
  };
}

/**
 * The server writes this header itself from the socket, or, told to trust the proxy before it, keeps the
 * proxy's, whose own entry is the last. IPv4 inside IPv6 is written as IPv4, as allow lists have it, and the name of
 * this machine's own interface, which follows a link-local address, is no part of the address.
 */
function addressOf(request: Request): string | null {
  const last = request.headers.get('x-forwarded-for')?.split(',').pop()?.trim() ?? '';
  const address = last.replace(/^::ffff:(?=\d+\.\d+\.\d+\.\d+$)/i, '').replace(/%.*$/, '');
  return isIP(address) ? address : null;
}
