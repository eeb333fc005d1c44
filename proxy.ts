/**
 * Headers of the pages: a content security policy with a nonce of its own for each answer, and the
 * rest of what keeps a page to itself. The API sets its headers where it answers; nothing here
 * touches /api. Next puts the nonce on its scripts when the policy stands in the request's headers.
 */
import { NextResponse, type NextRequest } from 'next/server';

const production = process.env.NODE_ENV === 'production';

export function proxy(request: NextRequest) {
  const nonce = Buffer.from(crypto.getRandomValues(new Uint8Array(16))).toString('base64');
  const policy = contentSecurityPolicy(nonce);

  const headers = new Headers(request.headers);
  headers.set('x-nonce', nonce);
  headers.set('Content-Security-Policy', policy);

  const response = NextResponse.next({ request: { headers } });
  response.headers.set('Content-Security-Policy', policy);
  response.headers.set('X-Content-Type-Options', 'nosniff');
  response.headers.set('Referrer-Policy', 'same-origin');
  response.headers.set('Permissions-Policy', 'camera=(), microphone=(), geolocation=(), payment=(), usb=()');
  response.headers.set('Cross-Origin-Opener-Policy', 'same-origin');
  return response;
}

function contentSecurityPolicy(nonce: string): string {
  // React's development build rebuilds server stacks with eval; the production build does without.
  const evalInDevelopment = production ? '' : " 'unsafe-eval'";
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${evalInDevelopment}`,
    // Plots and the API reference set style attributes, which no nonce can cover.
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    "connect-src 'self'",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join('; ');
}

export const config = {
  matcher: [
    {
      source: '/((?!api/|api$|_next/static|_next/image|mark.svg).*)',
      // A prefetch is not a page: a nonce in it would never match the document that uses it.
      missing: [
        { type: 'header', key: 'next-router-prefetch' },
        { type: 'header', key: 'purpose', value: 'prefetch' },
      ],
    },
  ],
};
