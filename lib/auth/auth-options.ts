import type { NextAuthOptions } from 'next-auth';
import CredentialsProvider from 'next-auth/providers/credentials';
import { ServiceError } from '@/lib/domain/errors';
import { clientAddress } from '@/lib/http/client-address';
import { recordIncident } from '@/lib/http/incident';
import { loadUserActor } from '@/lib/services/session/load-user-actor';
import { verifySignIn } from '@/lib/services/session/verify-sign-in';
import { safeReturnPath } from './safe-return-path';

/** One working shift: after it the password is asked for again. */
const SESSION_SECONDS = 12 * 60 * 60;

declare module 'next-auth' {
  interface Session {
    claims: SessionClaims;
  }
  interface User {
    siteId: string;
    sessionEpoch: number;
  }
}

/** All that the (encrypted) cookie holds. Names and roles are read from the database each time. */
export interface SessionClaims {
  readonly siteId: string;
  readonly userId: string;
  readonly sessionEpoch: number;
}

export function claimsOf(token: Record<string, unknown>): SessionClaims | null {
  const { sub, siteId, sessionEpoch } = token;
  return typeof sub === 'string' && typeof siteId === 'string' && typeof sessionEpoch === 'number'
    ? { userId: sub, siteId, sessionEpoch }
    : null;
}

export const authOptions: NextAuthOptions = {
  session: { strategy: 'jwt', maxAge: SESSION_SECONDS },
  pages: { signIn: '/sign-in', signOut: '/sign-in', error: '/sign-in', verifyRequest: '/sign-in' },
  providers: [
    CredentialsProvider({
      name: 'E-mail and password',
      credentials: { email: { type: 'email' }, password: { type: 'password' } },
      async authorize(credentials, request) {
        try {
          const account = await verifySignIn({
            email: credentials?.email ?? '',
            password: credentials?.password ?? '',
            address: clientAddress(request.headers?.['x-forwarded-for'] as string | undefined),
          });
          return { id: account.userId, siteId: account.siteId, sessionEpoch: account.sessionEpoch };
        } catch (error) {
          // next-auth puts the message into a URL: only a code may leave.
          if (error instanceof ServiceError && error.code === 'unauthenticated') return null;
          if (error instanceof ServiceError) throw new Error(error.code, { cause: error });
          recordIncident(error, 'sign-in');
          throw new Error('unavailable', { cause: error });
        }
      },
    }),
  ],
  callbacks: {
    async jwt({ token, user }) {
      if (user) return { sub: user.id, siteId: user.siteId, sessionEpoch: user.sessionEpoch };
      const claims = claimsOf(token);
      // A throw here makes next-auth clear the cookie: signed out everywhere, disabled, or forged.
      if (!claims || !(await loadUserActor(claims))) throw new Error('session-ended');
      return { sub: claims.userId, siteId: claims.siteId, sessionEpoch: claims.sessionEpoch };
    },
    session({ session, token }) {
      const claims = claimsOf(token);
      return claims ? { expires: session.expires, claims } : { ...session, expires: new Date(0).toISOString() };
    },
    redirect({ url, baseUrl }) {
      const path = url.startsWith(`${baseUrl}/`) ? url.slice(baseUrl.length) : url;
      // next-auth sends its own pages through here too; those are ours and may be returned to.
      return new URL(/^\/sign-in([?#]|$)/.test(path) ? path : safeReturnPath(path), baseUrl).href;
    },
  },
  logger: {
    // Ended sessions are everyday; everything else that next-auth reports is not.
    error(code, metadata) {
      const cause = metadata instanceof Error ? metadata : (metadata as { error?: unknown }).error;
      if (cause instanceof Error && cause.message === 'session-ended') return;
      recordIncident(cause ?? new Error(code), `next-auth ${code}`);
    },
    warn() {},
    debug() {},
  },
};
