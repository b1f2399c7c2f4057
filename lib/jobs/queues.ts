import * as z from 'zod';

/**
 * Every queue with the shape of its payload: the site and ids, nothing else. The handler opens a transaction for that
 * site and reads the rest, so a job can never carry stale or foreign data.
 */
export const QUEUES = {
  'deliver-mail': z.strictObject({ siteId: z.uuid(), outboxId: z.uuid() }),
  'make-plan-sheet': z.strictObject({ siteId: z.uuid(), sheetId: z.uuid() }),
  /** A scanner or a protocol changed; with neither, the policy did: what lists show of the coming bookings is stale. */
  'refresh-bookings': z.strictObject({ siteId: z.uuid(), scannerId: z.uuid().optional(), protocolId: z.uuid().optional() }),
} as const;

export type QueueName = keyof typeof QUEUES;
export type JobPayload<Name extends QueueName> = z.infer<(typeof QUEUES)[Name]>;

export const QUEUE_NAMES = Object.keys(QUEUES) as QueueName[];
