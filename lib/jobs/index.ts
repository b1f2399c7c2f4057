export { enqueue } from './enqueue';
export { type JobPayload, QUEUE_NAMES, QUEUES, type QueueName } from './queues';
