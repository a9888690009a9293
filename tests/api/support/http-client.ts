import { type IncomingHttpHeaders, request } from 'node:http';
import type { z } from 'zod';

export interface Answer {
  readonly status: number;
  readonly headers: IncomingHttpHeaders;
  readonly text: string;
  /** The text read as JSON; undefined where it is none. */
  readonly body: unknown;
  /** The body, read by a schema. */
  read<Schema extends z.ZodType>(schema: Schema): z.output<Schema>;
}

export interface SendOptions {
  /** Sent as JSON. */
  readonly body?: unknown;
  /** Sent as it is. */
  readonly text?: string;
  /** Beside those that a page of the server would send; undefined leaves one of those out. */
  readonly headers?: Readonly<Record<string, string | undefined>>;
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch {
    return undefined;
  }
}

/** Speaks to a server as its own pages would: JSON, a cookie where there is one, the Origin of the server. */
export class HttpClient {
  constructor(
    readonly address: string,
    readonly cookie?: string,
  ) {}

  get(path: string, options?: SendOptions): Promise<Answer> {
    return this.send('GET', path, options);
  }

  post(path: string, body?: unknown, options?: SendOptions): Promise<Answer> {
    return this.send('POST', path, { body, ...options });
  }

  put(path: string, body?: unknown, options?: SendOptions): Promise<Answer> {
    return this.send('PUT', path, { body, ...options });
  }

  patch(path: string, body?: unknown, options?: SendOptions): Promise<Answer> {
    return this.send('PATCH', path, { body, ...options });
  }

  delete(path: string, options?: SendOptions): Promise<Answer> {
    return this.send('DELETE', path, options);
  }

  send(method: string, path: string, { body, text, headers = {} }: SendOptions = {}): Promise<Answer> {
    const content = text ?? (body === undefined ? undefined : JSON.stringify(body));
    const all: Record<string, string | undefined> = {
      'content-length': String(Buffer.byteLength(content ?? '')),
      ...(content === undefined ? {} : { 'content-type': 'application/json' }),
      ...(this.cookie === undefined ? {} : { cookie: this.cookie }),
      origin: this.address,
      ...headers,
    };
    const sent = Object.fromEntries(Object.entries(all).filter(([, value]) => value !== undefined));
    return new Promise((resolve, reject) => {
      const outgoing = request(
        `${this.address}${path}`,
        { method, headers: sent, agent: false },
        (incoming) => {
          const chunks: Buffer[] = [];
          incoming.on('data', (chunk: Buffer) => chunks.push(chunk));
          incoming.on('error', reject);
          incoming.on('end', () => {
            const received = Buffer.concat(chunks).toString();
            const json = parsed(received);
            resolve({
              status: incoming.statusCode ?? 0,
              headers: incoming.headers,
              text: received,
              body: json,
              read: (schema) => schema.parse(json),
            });
          });
        },
      );
      outgoing.on('error', reject);
      outgoing.end(content);
    });
  }
}
