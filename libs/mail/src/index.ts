export { createMailTransport } from './transport';
export type { MailTransport, OutgoingAttachment, OutgoingMessage } from './transport';
export { MailSendError } from './mail-send-error';
export { MailCatcher } from './catcher/mail-catcher';
export type { MailCatcherOptions } from './catcher/mail-catcher';
export type { CaughtMessage } from './catcher/caught-message';
