import { type NextRequest, NextResponse } from 'next/server';
import { contentSecurityPolicy } from '@/lib/http/content-security-policy';

/** Gives every page a fresh nonce. Next puts it on the scripts and styles it writes when it finds it in the policy. */
export function proxy(request: NextRequest): NextResponse {
  const nonce = btoa(crypto.randomUUID());
  const policy = contentSecurityPolicy(nonce, process.env.NODE_ENV === 'development');

  const headers = new Headers(request.headers);
  headers.set('x-nonce', nonce);
  headers.set('content-security-policy', policy);
  // Where to come back to after signing in; a page cannot see its own address otherwise.
  headers.set('x-selvedge-path', `${request.nextUrl.pathname}${request.nextUrl.search}`);

  const response = NextResponse.next({ request: { headers } });
  response.headers.set('content-security-policy', policy);
  return response;
}

export const config = {
  matcher: [{ source: '/((?!_next/static|_next/image|favicon.ico|icon.svg).*)' }],
};
