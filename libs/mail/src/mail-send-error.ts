/** A message that the mail server did not accept. */
export class MailSendError extends Error {
  constructor(
    detail: string,
    /** The server's three digits, when it answered at all. */
    readonly responseCode: number | undefined,
    options?: ErrorOptions,
  ) {
    super(detail, options);
    this.name = 'MailSendError';
  }

  /** Whether the server has said that trying again will not help (5yz; RFC 5321, 4.2.1). */
  get isPermanent(): boolean {
    return this.responseCode !== undefined && this.responseCode >= 500;
  }

  static from(cause: unknown): MailSendError {
    const { message, responseCode } = cause as { message?: string; responseCode?: number };
    return new MailSendError(message ?? String(cause), responseCode, { cause });
  }
}
