export { insertMail, type NewMail } from './insert-mail';
export { listMessageIds } from './list-message-ids';
export { recordFailure, recordSent } from './record-delivery';
export { type QueuedMail, takeQueuedMail } from './take-queued-mail';
