/** A letter in plain text. */
export interface Letter {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
}

/** The way out for mail. */
export interface MailTransport {
  /** @throws Error where the letter was not taken */
  deliver(letter: Letter): Promise<void>;
  close(): void;
}
