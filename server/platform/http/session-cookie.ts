import type { IncomingHttpHeaders } from 'node:http';

/**
 * The cookie that carries a session's token. By https it has the prefix that binds it to this host and to https;
 * on loopback's http not every browser would take such a cookie.
 */
export interface SessionCookie {
  read(headers: IncomingHttpHeaders): string | undefined;
  /** Value of Set-Cookie that hands out a token. */
  give(token: string, maxAgeSeconds: number): string;
  /** Value of Set-Cookie that takes it back. */
  clear(): string;
}

export function sessionCookie({ https }: { https: boolean }): SessionCookie {
  const name = https ? '__Host-tareline-session' : 'tareline-session';
  const attributes = `Path=/; HttpOnly; SameSite=Lax${https ? '; Secure' : ''}`;
  return {
    read: ({ cookie }) => {
      const pairs = cookie?.split(';').map((pair) => pair.trim().split('=')) ?? [];
      return pairs.find(([key]) => key === name)?.[1];
    },
    give: (token, maxAgeSeconds) => `${name}=${token}; ${attributes}; Max-Age=${maxAgeSeconds}`,
    clear: () => `${name}=; ${attributes}; Max-Age=0`,
  };
}
