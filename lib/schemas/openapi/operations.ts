import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import type { Scope } from '@/lib/domain/access';
import { listBookingsQuery } from '@/lib/schemas/booking';
import { idParams } from '@/lib/schemas/fields/ids';
import { CHECK_EXAMPLES, NEW_BOOKING_EXAMPLES, NEW_READING_EXAMPLES, SAVE_PLAN_EXAMPLES, START_IMPORT_EXAMPLES } from '@/lib/schemas/openapi/examples';
import type { AnswerName, RequestName } from '@/lib/schemas/openapi/components';
import { sheetParams } from '@/lib/schemas/plan-sheet';
import { codeParams, idempotencyKeySchema, planQuery } from '@/lib/schemas/plan';

export interface Operation {
  readonly method: 'get' | 'post' | 'put';
  readonly path: string;
  readonly id: string;
  readonly summary: string;
  /** Scope a token needs; absent: people only, through their session. */
  readonly scope?: Scope;
  readonly params?: z.ZodObject;
  readonly query?: z.ZodObject;
  readonly headers?: z.ZodObject;
  readonly request?: RequestName;
  readonly examples?: Readonly<Record<string, { readonly summary: string; readonly value: unknown }>>;
  /** A second content type of the body, with its answer. */
  readonly bundle?: AnswerName;
  readonly answer: AnswerName | 'application/pdf' | 'nothing';
  readonly status?: number;
}

const saveHeaders = z.object({ 'Idempotency-Key': idempotencyKeySchema });

/** Every route of the API; a test compares the list with the folders. */
export const OPERATIONS: readonly Operation[] = [
  {
    method: 'post', path: '/api/v1/check', id: 'checkCase', scope: 'check:run', request: 'CaseInput', answer: 'CheckAnswer',
    summary: 'What folds for one patient and one sequence, and the remedies by cost. Nothing is stored.', examples: CHECK_EXAMPLES,
  },
  {
    method: 'get', path: '/api/v1/bookings', id: 'listBookings', scope: 'bookings:read', query: listBookingsQuery,
    answer: 'BookingPage', summary: 'Bookings between two days, by time.',
  },
  {
    method: 'post', path: '/api/v1/bookings', id: 'createBooking', scope: 'bookings:write', request: 'NewBooking',
    answer: 'Booking', status: 201, bundle: 'BundleDone',
    summary: 'Adds a booking under its accession number; a FHIR R4 bundle of Appointments, ServiceRequests and Observations adds or changes many.', examples: NEW_BOOKING_EXAMPLES,
  },
  {
    method: 'post', path: '/api/v1/imports', id: 'startImport', scope: 'bookings:write', request: 'StartImport',
    answer: 'ImportStarted', status: 201, summary: 'Starts an import of many bookings, under an id the caller draws.', examples: START_IMPORT_EXAMPLES,
  },
  {
    method: 'post', path: '/api/v1/imports/{id}/rows', id: 'stageRows', scope: 'bookings:write', params: idParams, request: 'StageRows',
    answer: 'StagedRows', summary: 'Takes a piece of rows and says what each will do. Nothing is booked yet; the same piece sent twice is one.',
  },
  {
    method: 'post', path: '/api/v1/imports/{id}/commit', id: 'commitImport', scope: 'bookings:write', params: idParams, request: 'CommitImport',
    answer: 'ImportDone', summary: 'Books what was staged, all of it or nothing. Sent twice it answers what was done.',
  },
  {
    method: 'post', path: '/api/v1/imports/{id}/cancel', id: 'cancelImport', scope: 'bookings:write', params: idParams,
    answer: 'nothing', status: 204, summary: 'Gives up an import that is not committed.',
  },
  {
    method: 'get', path: '/api/v1/bookings/{id}', id: 'getBooking', scope: 'bookings:read', params: idParams,
    answer: 'Booking', summary: 'One booking.',
  },
  {
    method: 'put', path: '/api/v1/bookings/{id}', id: 'changeBooked', scope: 'bookings:write', params: idParams, request: 'ChangeBooked',
    answer: 'Booking', summary: 'What the booking system says now: a proposed move that it agrees with is closed, and the booking is checked again.',
  },
  {
    method: 'get', path: '/api/v1/bookings/{id}/bench', id: 'openBench', scope: 'plans:read', params: idParams,
    answer: 'Bench', summary: 'Everything the bench needs of a booking.',
  },
  {
    method: 'get', path: '/api/v1/bookings/{id}/newest-version', id: 'getNewestVersion', scope: 'plans:read', params: idParams,
    answer: 'NewestVersion', summary: 'Which version of a booking’s plan is the newest, and who saved it when.',
  },
  {
    method: 'get', path: '/api/v1/bookings/{id}/size-readings', id: 'getSizeRecord', scope: 'bookings:read',
    params: idParams, answer: 'SizeRecord', summary: 'Sizes of a booking’s patient.',
  },
  {
    method: 'post', path: '/api/v1/bookings/{id}/size-readings', id: 'recordReadings', scope: 'sizes:write',
    params: idParams, request: 'NewSizeReadings', answer: 'SizeRecord', summary: 'Adds size readings; earlier ones stay.',
    examples: NEW_READING_EXAMPLES,
  },
  {
    method: 'get', path: '/api/v1/plans/{id}', id: 'getPlan', scope: 'plans:read', params: idParams, query: planQuery,
    answer: 'Plan', summary: 'A plan in its newest version, or in the one that is named.',
  },
  {
    method: 'put', path: '/api/v1/plans/{id}', id: 'savePlan', scope: 'plans:write', params: idParams, headers: saveHeaders,
    request: 'SavePlan', answer: 'Plan', examples: SAVE_PLAN_EXAMPLES,
    summary: 'Saves a whole plan as its next version; the server works everything out again. The id is the caller’s, a new one makes a plan.',
  },
  {
    method: 'post', path: '/api/v1/plans/{id}/state', id: 'movePlan', params: idParams, request: 'MovePlan', answer: 'Plan',
    summary: 'Puts a plan for use, takes it back to draft, or marks it as used.',
  },
  {
    method: 'post', path: '/api/v1/plans/{id}/sign-off', id: 'signOffPlan', params: idParams, request: 'SignOff',
    answer: 'Plan', summary: 'A radiologist’s decision on one version of a plan.',
  },
  {
    method: 'get', path: '/api/v1/plans/{id}/outcomes', id: 'listOutcomes', scope: 'outcomes:read', params: idParams,
    answer: 'OutcomeList', summary: 'What came of a plan, newest first.',
  },
  {
    method: 'post', path: '/api/v1/plans/{id}/outcomes', id: 'recordOutcome', scope: 'outcomes:write', params: idParams,
    request: 'NewOutcome', answer: 'Outcome',
    summary: 'Records what came of a plan, which becomes used. The id is the caller’s: the same outcome sent twice is one.',
  },
  {
    method: 'post', path: '/api/v1/plans/{id}/sheets', id: 'requestSheet', params: idParams, request: 'RequestSheet',
    answer: 'Sheet', summary: 'Asks for a plan sheet as PDF; the same sheet is made once.',
  },
  {
    method: 'get', path: '/api/v1/plans/{id}/sheets/{sheetId}', id: 'getSheet', scope: 'plans:read', params: sheetParams,
    answer: 'Sheet', summary: 'Where the making of a plan sheet stands.',
  },
  {
    method: 'get', path: '/api/v1/plans/{id}/sheets/{sheetId}/pdf', id: 'getSheetFile', scope: 'plans:read', params: sheetParams,
    answer: 'application/pdf', summary: 'The finished plan sheet.',
  },
  {
    method: 'get', path: '/api/v1/plans/by-code/{code}', id: 'getPlanByCode', scope: 'plans:read', params: codeParams,
    query: planQuery, answer: 'Plan', summary: 'The plan behind the short link of a sheet.',
  },
  {
    method: 'get', path: '/api/v1/scanners', id: 'listScanners', scope: 'setup:read', answer: 'ScannerList',
    summary: 'The site’s scanners.',
  },
  {
    method: 'get', path: '/api/v1/scanners/{id}', id: 'getScanner', scope: 'setup:read', params: idParams,
    answer: 'ScannerVersion', summary: 'One scanner.',
  },
  {
    method: 'get', path: '/api/v1/protocols', id: 'listProtocols', scope: 'setup:read', answer: 'ProtocolList',
    summary: 'The site’s protocols.',
  },
  {
    method: 'get', path: '/api/v1/protocols/{id}', id: 'getProtocol', scope: 'setup:read', params: idParams,
    answer: 'ProtocolVersion', summary: 'One protocol with its sequences.',
  },
  {
    method: 'get', path: '/api/v1/policy', id: 'getPolicy', scope: 'setup:read', answer: 'PolicyVersion',
    summary: 'The site’s policy.',
  },
];
