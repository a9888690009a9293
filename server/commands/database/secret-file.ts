import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs';

/** Random, and of letters that need no quoting anywhere. */
export function newPassword(): string {
  return randomBytes(24).toString('base64url');
}

/** The password that a file holds; made, for the present user's eyes only, where there is none yet. */
export function keptPassword(file: string): string {
  if (!existsSync(file)) {
    const prepared = `${file}.new`;
    writeFileSync(prepared, `${newPassword()}\n`, { mode: 0o600 });
    renameSync(prepared, file);
  }
  return readFileSync(file, 'utf8').trim();
}
