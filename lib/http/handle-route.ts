import type { Actor } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';
import { parseInput } from '@/lib/schemas/parse-input';
import type { ServiceContext } from '@/lib/services/context';
import { requestActor } from '@/lib/auth/request-actor';
import { randomUUID } from 'node:crypto';
import type * as z from 'zod';
import { problemResponse } from './problem';
import { DEFAULT_MAX_BODY_BYTES, readJson } from './read-json';

type Parsed<S> = S extends z.ZodType ? z.output<S> : undefined;
type Schema = z.ZodType | undefined;

export interface RouteOptions<B extends Schema, Q extends Schema, P extends Schema> {
  /** Path parameters, such as `{ id: uuid }`. */
  readonly params?: P;
  /** Search parameters; a repeated name gives the last value. */
  readonly query?: Q;
  /** JSON body. */
  readonly body?: B;
  readonly maxBodyBytes?: number;
}

interface Inputs<B extends Schema, Q extends Schema, P extends Schema> {
  readonly params: Parsed<P>;
  readonly query: Parsed<Q>;
  readonly body: Parsed<B>;
  readonly request: Request;
}

export interface RouteCall<B extends Schema, Q extends Schema, P extends Schema> extends Inputs<B, Q, P> {
  readonly actor: Actor;
  readonly context: ServiceContext;
}

/** What Next passes as second argument. */
interface RouteSegment {
  readonly params: Promise<Record<string, string | string[] | undefined>>;
}
type RouteHandler = (request: Request, segment: RouteSegment) => Promise<Response>;

async function readInputs<B extends Schema, Q extends Schema, P extends Schema>(
  options: RouteOptions<B, Q, P>,
  request: Request,
  segment: RouteSegment,
): Promise<Inputs<B, Q, P>> {
  // An id that is no id names nothing: the same answer as for an id that does not exist.
  const params = options.params?.safeParse(await segment.params);
  if (params && !params.success) throw new ServiceError('not-found');
  const search = Object.fromEntries(new URL(request.url).searchParams);
  return {
    params: params?.data as Parsed<P>,
    query: (options.query ? parseInput(options.query, search) : undefined) as Parsed<Q>,
    body: (options.body
      ? parseInput(options.body, await readJson(request, options.maxBodyBytes ?? DEFAULT_MAX_BODY_BYTES))
      : undefined) as Parsed<B>,
    request,
  };
}

function respond(result: unknown): Response {
  if (result instanceof Response) return result;
  const headers = { 'cache-control': 'no-store' };
  return result === undefined ? new Response(null, { status: 204, headers }) : Response.json(result, { headers });
}

/**
 * A route handler for people and machines: bearer token or session cookie → actor; parse → service → respond.
 * The handler returns plain data (200), nothing (204) or a Response of its own. It does not authorise: the service does.
 */
export function handleRoute<
  B extends Schema = undefined,
  Q extends Schema = undefined,
  P extends Schema = undefined,
>(options: RouteOptions<B, Q, P>, handler: (call: RouteCall<B, Q, P>) => Promise<unknown>): RouteHandler {
  return async (request, segment) => {
    try {
      const actor = await requestActor(request);
      const inputs = await readInputs(options, request, segment);
      return respond(await handler({ ...inputs, actor, context: { actor, requestId: randomUUID() } }));
    } catch (error) {
      return problemResponse(error, `${request.method} ${new URL(request.url).pathname}`);
    }
  };
}

/** The same for callers without an account (a shared link, a health check): no actor is looked for, no cookie is read. */
export function handlePublicRoute<
  B extends Schema = undefined,
  Q extends Schema = undefined,
  P extends Schema = undefined,
>(options: RouteOptions<B, Q, P>, handler: (call: Inputs<B, Q, P>) => Promise<unknown>): RouteHandler {
  return async (request, segment) => {
    try {
      return respond(await handler(await readInputs(options, request, segment)));
    } catch (error) {
      return problemResponse(error, `${request.method} ${new URL(request.url).pathname}`);
    }
  };
}
