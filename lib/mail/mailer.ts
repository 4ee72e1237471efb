/** A mail to one person. `id` stays the same when it is tried again, so that a mailbox can tell a repetition. */
export interface Mail {
  readonly id: string;
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string | null;
}

export interface Mailer {
  /** Resolves when the mail server has taken the mail; rejects when it has not. */
  send(mail: Mail): Promise<void>;
  /** Rejects when the mail server does not answer within ten seconds. */
  check(): Promise<void>;
  close(): void;
}
