import { z } from 'zod';
import { emailSchema } from '../../shared/contracts/api';

/** Something in the environment that the server cannot work with; the message is all that the person needs. */
export class ConfigurationError extends Error {
  override readonly name = 'ConfigurationError';
}

export type LogLevel = 'silent' | 'error' | 'warn' | 'info' | 'debug';

export interface HttpConfiguration {
  readonly host: string;
  /** 0 lets the system choose. */
  readonly port: number;
  /** The address that browsers use, as `https://tareline.example`; undefined on loopback, where any port may do. */
  readonly origin: string | undefined;
  /** Addresses or subnets of proxies whose X-Forwarded-For is believed. */
  readonly trustedProxies: readonly string[];
}

/** Where mail goes out; without it mail stays in the outbox, where administrators read it. */
export interface MailConfiguration {
  readonly smtpUrl: string;
  readonly from: string;
}

export interface DatabaseConfiguration {
  /** Undefined: the private server of this checkout. */
  readonly url: string | undefined;
  /** A role that may change the schema, where `url` is a role that may not. */
  readonly ownerUrl: string | undefined;
}

export interface Configuration {
  readonly http: HttpConfiguration;
  readonly database: DatabaseConfiguration;
  readonly mail: MailConfiguration | undefined;
  /** Who is invited first where nobody is in the organisation yet; stated by those who want no demo. */
  readonly administratorEmail: string | undefined;
  readonly logLevel: LogLevel;
}

const DEFAULT_PORT = 4300;
const DEFAULT_HOST = '127.0.0.1';

/** An empty variable is one that was not set: `PORT= npm start` asks for the default. */
const optional = <T extends z.ZodType>(schema: T) =>
  z.preprocess((value) => (value === '' ? undefined : value), schema.optional());

const urlOf = (...protocols: string[]) =>
  z.string().refine((text) => URL.canParse(text) && protocols.includes(new URL(text).protocol), {
    error: `must be a URL that begins with ${protocols.map((protocol) => `${protocol}//`).join(' or ')}`,
  });

const environmentSchema = z
  .object({
    HOST: optional(z.string()),
    PORT: optional(
      z
        .string()
        .regex(/^\d{1,5}$/, 'must be a number from 0 to 65535')
        .transform(Number)
        .refine((port) => port <= 65535, 'must be a number from 0 to 65535'),
    ),
    PUBLIC_ORIGIN: optional(
      urlOf('https:', 'http:').refine((text) => new URL(text).pathname === '/' && !text.includes('?'), {
        error: 'must be an address without a path, such as https://tareline.example',
      }),
    ),
    TRUSTED_PROXIES: optional(z.string()),
    DATABASE_URL: optional(urlOf('postgres:', 'postgresql:')),
    DATABASE_OWNER_URL: optional(urlOf('postgres:', 'postgresql:')),
    SMTP_URL: optional(urlOf('smtp:', 'smtps:')),
    MAIL_FROM: optional(z.string()),
    ADMINISTRATOR_EMAIL: optional(emailSchema),
    LOG_LEVEL: optional(z.enum(['silent', 'error', 'warn', 'info', 'debug'])),
  })
  .refine((env) => env.DATABASE_OWNER_URL === undefined || env.DATABASE_URL !== undefined, {
    path: ['DATABASE_OWNER_URL'],
    error: 'is of no use without DATABASE_URL',
  })
  .refine((env) => env.SMTP_URL === undefined || env.MAIL_FROM !== undefined, {
    path: ['MAIL_FROM'],
    error: 'must be set beside SMTP_URL: the address that mail comes from',
  });

/** Whether a host name or address can be reached from this machine only. */
export function isLoopback(host: string): boolean {
  return host === 'localhost' || host === '::1' || host === '[::1]' || /^127(\.\d{1,3}){3}$/.test(host);
}

/** Whether nobody on another machine reaches the server: neither directly nor through a proxy. */
export function servesThisMachineOnly({ host, origin }: Pick<HttpConfiguration, 'host' | 'origin'>): boolean {
  return isLoopback(host) && (origin === undefined || isLoopback(new URL(origin).hostname));
}

function proxiesOf(stated: string | undefined, origin: string | undefined): string[] {
  if (stated !== undefined) return stated.split(',').map((proxy) => proxy.trim());
  // An https origin means that a proxy in front of this server speaks https, most often on the same machine.
  return origin === undefined ? [] : ['loopback'];
}

/**
 * Reads the settings of server and commands.
 *
 * @param environment as `process.env`
 * @throws ConfigurationError that names every variable which cannot be used
 */
export function readConfiguration(environment: Record<string, string | undefined>): Configuration {
  const parsed = environmentSchema.safeParse(environment);
  if (!parsed.success) {
    const faults = parsed.error.issues.map(({ path, message }) => `${path.join('.')} ${message}`);
    throw new ConfigurationError(faults.join('\n'));
  }
  const env = parsed.data;
  const host = env.HOST ?? DEFAULT_HOST;
  const origin = env.PUBLIC_ORIGIN === undefined ? undefined : new URL(env.PUBLIC_ORIGIN).origin;
  if (!isLoopback(host) && origin?.startsWith('https:') !== true) {
    throw new ConfigurationError(
      `HOST ${host} can be reached from other machines, and sign-ins must not cross a network unencrypted; ` +
        'set PUBLIC_ORIGIN to the https address that people use',
    );
  }
  return {
    http: {
      host,
      port: env.PORT ?? DEFAULT_PORT,
      origin,
      trustedProxies: proxiesOf(env.TRUSTED_PROXIES, origin),
    },
    database: { url: env.DATABASE_URL, ownerUrl: env.DATABASE_OWNER_URL },
    mail:
      env.SMTP_URL === undefined || env.MAIL_FROM === undefined
        ? undefined
        : { smtpUrl: env.SMTP_URL, from: env.MAIL_FROM },
    administratorEmail: env.ADMINISTRATOR_EMAIL,
    logLevel: env.LOG_LEVEL ?? 'info',
  };
}
