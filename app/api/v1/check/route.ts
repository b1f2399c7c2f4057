import * as z from 'zod';
import { handleRoute } from '@/lib/http/handle-route';
import { rateLimit } from '@/lib/http/rate-limit';
import { renderAnswer } from '@/lib/services/check/check-case';
import { runCheck } from '@/lib/services/check/run-check';

/** A ranking takes a good part of a second at worst, so one caller may not fill a core. */
const limit = rateLimit({ burst: 60, perMinute: 120 });
/** An uploaded outline of some thousand points fits; more is a mistake. */
const MAX_BODY_BYTES = 262_144;

/** Checks one case; nothing is stored. */
export const POST = handleRoute({ body: z.unknown(), maxBodyBytes: MAX_BODY_BYTES }, async ({ actor, context, body }) => {
  limit.count(actor);
  return new Response(renderAnswer(runCheck(context, body)), {
    headers: { 'content-type': 'application/json', 'cache-control': 'no-store' },
  });
});
