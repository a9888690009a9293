import { argon2id, hash, needsRehash, verify } from 'argon2';
import { newToken } from '../../platform/opaque-token';

/** argon2id with 19 MiB, two passes, one lane: the first choice of OWASP's Password Storage Cheat Sheet. */
const PARAMETERS = { type: argon2id, memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

const OURS = /^\$argon2id\$/;

export interface Passwords {
  hash(password: string): Promise<string>;
  /**
   * Whether a password fits a hash. Without a hash, or with a text that is none, it does the same work and the
   * answer is no: how long it takes tells nobody whether there is such a person.
   */
  verify(passwordHash: string | undefined, password: string): Promise<boolean>;
  /** Whether a hash was made with other parameters than those of today. */
  isDated(passwordHash: string): boolean;
}

export function createPasswords(): Passwords {
  const make = (password: string) => hash(password, PARAMETERS);
  const decoy = make(newToken());
  // Whoever waits for it is told; a failure that nobody waits for yet must not end the process.
  decoy.catch(() => undefined);
  return {
    hash: make,
    verify: async (passwordHash, password) => {
      const real = passwordHash !== undefined && OURS.test(passwordHash);
      const fits = await verify(real ? passwordHash : await decoy, password);
      return real && fits;
    },
    isDated: (passwordHash) => needsRehash(passwordHash, PARAMETERS),
  };
}
