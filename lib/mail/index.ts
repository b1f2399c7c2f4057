export { type CaughtMail, keepCaughtMail, listCaughtMail } from './caught-mail';
export { MAIL_KINDS, type MailKind, type MailPayload, type MailText, writeMail } from './messages';
export { queueMail } from './queue-mail';
export { MAX_ATTEMPTS, retryDelaySeconds } from './retry-delay';
export { type MailTransport, type OutgoingMail, smtpTransport } from './transport';
