import { quoted } from './quoted';

export type PathPart = string | number;

/** The path of the whole study. */
export const ROOT_PATH = 'study';

const PLAIN_KEY = /^[A-Za-z_$][\w$-]{0,39}'*$/;

/** `['machine', 'mass', 0, 1]` → `machine.mass[0][1]`; keys that would not read plainly are quoted in brackets. */
export function formatPath(parts: readonly PropertyKey[]): string {
  if (parts.length === 0) return ROOT_PATH;
  return parts.reduce<string>((path, part) => {
    if (typeof part === 'number') return `${path}[${part}]`;
    const key = String(part);
    if (!PLAIN_KEY.test(key)) return `${path}[${quoted(key)}]`;
    return path === '' ? key : `${path}.${key}`;
  }, '');
}
