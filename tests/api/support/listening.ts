import { createServer, type RequestListener, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';

/** A server on a port of the system's choice. */
export interface Listening {
  readonly address: string;
  readonly server: Server;
  /** Ends connections that are still open as well. */
  close(): Promise<void>;
}

export function listenLocally(listener: RequestListener): Promise<Listening> {
  const server = createServer(listener);
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address() as AddressInfo;
      resolve({
        address: `http://127.0.0.1:${port}`,
        server,
        close: () =>
          new Promise((closed) => {
            server.close(() => closed());
            server.closeAllConnections();
          }),
      });
    });
  });
}
