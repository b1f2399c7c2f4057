export { insertMail, type NewMail } from './insert-mail';
export { recordFailure, recordSent } from './record-delivery';
export { type QueuedMail, takeQueuedMail } from './take-queued-mail';
