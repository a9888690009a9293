import { type IncomingMessage, request } from 'node:http';

export interface ReadEvent {
  readonly id: number;
  readonly kind: string;
  readonly data: unknown;
}

/** A stream of server-sent events under way. */
export interface EventReader {
  readonly status: number;
  readonly contentType: string | undefined;
  /** The next event, waited for; undefined when the server has ended the stream. */
  next(): Promise<ReadEvent | undefined>;
  /** Leaves, as a closed page does. */
  leave(): void;
}

function readFrame(frame: string): ReadEvent | undefined {
  const fields = new Map(
    frame
      .split('\n')
      .filter((line) => !line.startsWith(':'))
      .map((line) => [line.slice(0, line.indexOf(':')), line.slice(line.indexOf(':') + 2)]),
  );
  const data = fields.get('data');
  if (data === undefined) return undefined;
  return {
    id: Number(fields.get('id')),
    kind: fields.get('event') ?? '',
    data: JSON.parse(data) as unknown,
  };
}

async function* framesOf(incoming: IncomingMessage): AsyncGenerator<ReadEvent, undefined> {
  let text = '';
  for await (const chunk of incoming) {
    text += String(chunk);
    const frames = text.split('\n\n');
    text = frames.pop() ?? '';
    for (const frame of frames) {
      const event = readFrame(frame);
      if (event !== undefined) yield event;
    }
  }
  return undefined;
}

export function openEvents(url: string, headers: Record<string, string> = {}): Promise<EventReader> {
  return new Promise((resolve, reject) => {
    const outgoing = request(url, { headers, agent: false }, (incoming) => {
      incoming.setEncoding('utf8');
      const events = framesOf(incoming);
      resolve({
        status: incoming.statusCode ?? 0,
        contentType: incoming.headers['content-type'],
        next: async () => {
          const result = await events.next();
          return result.done === true ? undefined : result.value;
        },
        leave: () => outgoing.destroy(),
      });
    });
    outgoing.on('error', reject);
    outgoing.end();
  });
}
