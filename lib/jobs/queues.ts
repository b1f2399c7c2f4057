import * as z from 'zod';

/**
 * Every queue with the shape of its payload: the site and ids, nothing else. The handler opens a transaction for that
 * site and reads the rest, so a job can never carry stale or foreign data.
 */
export const QUEUES = {
  'deliver-mail': z.strictObject({ siteId: z.uuid(), outboxId: z.uuid() }),
  'make-plan-sheet': z.strictObject({ siteId: z.uuid(), sheetId: z.uuid() }),
  'make-hand-out': z.strictObject({ siteId: z.uuid(), handOutId: z.uuid() }),
  /** Imports of this site are over: their staged rows go. */
  'erase-staged-rows': z.strictObject({ siteId: z.uuid() }),
  /** Bookings of this site wait for their check; which ones is in their state. The ids are of jobs from before. */
  'refresh-bookings': z.strictObject({ siteId: z.uuid(), scannerId: z.uuid().optional(), protocolId: z.uuid().optional() }),
} as const;

export type QueueName = keyof typeof QUEUES;
export type JobPayload<Name extends QueueName> = z.infer<(typeof QUEUES)[Name]>;

export const QUEUE_NAMES = Object.keys(QUEUES) as QueueName[];
