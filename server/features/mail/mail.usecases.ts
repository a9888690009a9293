import type { OutgoingMail } from '../../../shared/contracts/api';
import { type Db, type Executor, inTransaction } from '../../db';
import type { Log } from '../../platform/log';
import type { Letter, MailTransport } from '../../platform/mail/mail-transport';
import { insertLetter, markFailed, markSent, selectLetters, takeDueLetter } from './mail.repository';

const FIRST_PAUSE_SECONDS = 30;
const LONGEST_PAUSE_SECONDS = 6 * 3600;

/** Puts a letter into the outbox; in the transaction that causes it, so that neither stands without the other. */
export async function postLetter(tx: Executor, letter: Letter): Promise<void> {
  await insertLetter(tx, letter);
}

const MOST_LETTERS = 200;

/** The newest letters, sent or not. */
export async function listLetters({ db }: { readonly db: Db }): Promise<OutgoingMail[]> {
  const letters = await selectLetters(db, MOST_LETTERS);
  return letters.map(({ id, createdAt, recipient, subject, text, sentAt, lastError }) => ({
    ...{ id, subject, text },
    at: createdAt.toISOString(),
    to: recipient,
    state: sentAt !== null ? 'sent' : lastError !== null ? 'failed' : 'waiting',
  }));
}

export interface DeliverDependencies {
  readonly db: Db;
  readonly transport: MailTransport;
  readonly log: Log;
}

/**
 * Sends every letter that is due, each once however many servers share the outbox. One that is not taken stays,
 * and is tried again after pauses that double.
 *
 * @returns how many were sent
 */
export async function deliverDueLetters({ db, transport, log }: DeliverDependencies): Promise<number> {
  let sent = 0;
  for (;;) {
    const outcome = await inTransaction(db, async (tx) => {
      const letter = await takeDueLetter(tx);
      if (letter === undefined) return 'none left';
      try {
        await transport.deliver({ to: letter.recipient, subject: letter.subject, text: letter.text });
      } catch (error) {
        log.warn({ error, letter: letter.id }, 'a letter was not taken');
        const pause = Math.min(FIRST_PAUSE_SECONDS * 2 ** letter.attempts, LONGEST_PAUSE_SECONDS);
        await markFailed(tx, letter.id, error instanceof Error ? error.message : 'unknown error', pause);
        return 'failed';
      }
      await markSent(tx, letter.id);
      return 'sent';
    });
    if (outcome === 'none left') return sent;
    if (outcome === 'sent') sent += 1;
  }
}
