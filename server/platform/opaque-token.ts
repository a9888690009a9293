import { createHash, randomBytes } from 'node:crypto';

/** 256 bits: nothing that could be guessed, hence no salt and no slow hash are needed to store it. */
const TOKEN_BYTES = 32;

/** A secret to hand out: a session's cookie, the link of an invitation. Only its hash is stored. */
export function newToken(): string {
  return randomBytes(TOKEN_BYTES).toString('base64url');
}

const TOKEN_IN_PATH = /(?<=\/)[\w-]{43}(?=\/|$)/g;

/** A path in which no token can be read, for the log. */
export function withoutTokens(path: string): string {
  return path.replace(TOKEN_IN_PATH, '[secret]');
}

/** SHA-256 of a token in hexadecimal, as it stands in the database. */
export function hashToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}
