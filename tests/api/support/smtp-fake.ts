import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';

/** A mail server that keeps what it is given. */
export interface SmtpFake {
  readonly url: string;
  /** Letters as they came over the line, headers and text. */
  readonly letters: readonly string[];
  /** Refuses the next letter with this text. */
  refuseNext(reason: string): void;
  close(): Promise<void>;
}

export function startSmtpFake(): Promise<SmtpFake> {
  const letters: string[] = [];
  let refusal: string | undefined;
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    onData: (stream, _session, callback) => {
      const chunks: Buffer[] = [];
      stream.on('data', (chunk: Buffer) => chunks.push(chunk));
      stream.on('end', () => {
        if (refusal !== undefined) {
          callback(new Error(refusal));
          refusal = undefined;
          return;
        }
        letters.push(Buffer.concat(chunks).toString());
        callback();
      });
    },
  });
  return new Promise((resolve, reject) => {
    server.on('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.server.address() as AddressInfo;
      resolve({
        url: `smtp://127.0.0.1:${port}`,
        letters,
        refuseNext: (reason) => {
          refusal = reason;
        },
        close: () => new Promise((closed) => server.close(() => closed())),
      });
    });
  });
}
