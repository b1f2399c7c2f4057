import NextAuth from 'next-auth';
import { authOptions } from '@/lib/auth/auth-options';
import { ServiceError } from '@/lib/domain/errors';
import { problemResponse } from '@/lib/http/problem';

/** Far more than an address, a password and a form token need. */
const MAX_BYTES = 16_384;

const handler = NextAuth(authOptions);

export { handler as GET };

/** next-auth reads a body of any length, before anyone has shown who they are: one that does not say it is short is refused. */
export async function POST(request: Request, segment: unknown): Promise<Response> {
  const announced = request.headers.get('content-length');
  if (announced === null || Number(announced) > MAX_BYTES) {
    return problemResponse(new ServiceError('too-large'), 'POST /api/auth');
  }
  return handler(request, segment);
}
