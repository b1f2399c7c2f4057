import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { SCOPES, SCOPE_DESCRIPTIONS } from '@/lib/domain/access';
import { componentSchemas } from '@/lib/schemas/openapi/components';
import { OPERATIONS, type Operation } from '@/lib/schemas/openapi/operations';

const ref = (name: string) => ({ $ref: `#/components/schemas/${name}` });
const json = (name: string, examples?: unknown) => ({
  'application/json': { schema: ref(name), ...(examples ? { examples } : {}) },
});

const PROBLEMS: Readonly<Record<string, string>> = {
  400: 'The body is not JSON.',
  401: 'No token and no session, or one that does not hold.',
  404: 'There is nothing here, or it is not the caller’s to see or to do.',
  409: 'Someone else changed it in the meantime, or its state does not allow this. Nothing was overwritten.',
  413: 'The body is too large.',
  422: 'Some values cannot be accepted; each is named with what was given and what is allowed.',
  429: 'Too many calls; the header Retry-After says how long to wait.',
};

const BUNDLE = {
  'application/fhir+json': {
    schema: { type: 'object', description: 'FHIR R4 Bundle. Fields that are not on the list are dropped before anything is written.' },
  },
};

const answerOf = (answer: Exclude<Operation['answer'], 'nothing'>) =>
  answer === 'application/pdf' ? { [answer]: { schema: { type: 'string', format: 'binary' } } } : json(answer);

function parameters(schema: z.ZodObject | undefined, place: 'path' | 'query' | 'header'): unknown[] {
  if (!schema) return [];
  return Object.entries(schema.shape).map(([name, field]) => {
    const { $schema: _dialect, description, ...rest } = z.toJSONSchema(field as z.ZodType, { io: 'input' });
    const required = place !== 'query' && !(field as z.ZodType).safeParse(undefined).success;
    return { name, in: place, required, description, schema: rest };
  });
}

function problems({ request, params }: Operation): Record<string, unknown> {
  const codes = Object.keys(PROBLEMS).filter((code) => {
    if (['400', '413', '409'].includes(code)) return request !== undefined;
    return code !== '404' || params !== undefined || request !== undefined;
  });
  return Object.fromEntries(
    codes.map((code) => [
      code,
      { description: PROBLEMS[code], content: { 'application/problem+json': { schema: ref('Problem') } } },
    ]),
  );
}

function describe(operation: Operation): Record<string, unknown> {
  const { id, summary, scope, params, query, headers, request, examples, bundle, answer, status = 200 } = operation;
  return {
    operationId: id,
    summary,
    description: scope ? `Token scope: ${scope}.` : 'For people only: no token may.',
    security: scope ? [{ token: [] }, { session: [] }] : [{ session: [] }],
    parameters: [...parameters(params, 'path'), ...parameters(query, 'query'), ...parameters(headers, 'header')],
    ...(request ? { requestBody: { required: true, content: { ...json(request, examples), ...(bundle ? BUNDLE : {}) } } } : {}),
    responses: {
      [status]: { description: 'Done.', ...(answer === 'nothing' ? {} : { content: answerOf(answer) }) },
      ...(bundle ? { 200: { description: 'A bundle was taken.', content: answerOf(bundle) } } : {}),
      ...problems(operation),
    },
  };
}

function paths(): Record<string, Record<string, unknown>> {
  const made: Record<string, Record<string, unknown>> = {};
  for (const operation of OPERATIONS) {
    made[operation.path] = { ...made[operation.path], [operation.method]: describe(operation) };
  }
  return made;
}

/** The OpenAPI 3.1 description, made from the very schemas the routes parse with. */
export function openApiDocument(): Record<string, unknown> {
  return {
    openapi: '3.1.0',
    info: {
      title: 'Selvedge',
      version: '1',
      description:
        'Planning estimates of wrap-around in MR imaging. Lengths in mm; patient axes x left, y posterior, z superior. ' +
        'Trained staff, implant screening, equipment labelling and local policy decide.',
    },
    paths: paths(),
    components: {
      schemas: componentSchemas(),
      securitySchemes: {
        token: {
          type: 'http', scheme: 'bearer',
          description: `Scopes: ${SCOPES.map((scope) => `${scope} (${SCOPE_DESCRIPTIONS[scope]})`).join('; ')}.`,
        },
        session: { type: 'apiKey', in: 'cookie', name: 'next-auth.session-token', description: 'A signed-in person.' },
      },
    },
  };
}
