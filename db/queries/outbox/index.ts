export { insertMail, type NewMail } from './insert-mail';
export { countFailedMail, listMail, lockMail, type OutboxRow, queueAgain } from './list-mail';
export { listMessageIds } from './list-message-ids';
export { recordFailure, recordSent } from './record-delivery';
export { type QueuedMail, takeQueuedMail } from './take-queued-mail';
