import { randomInt } from 'node:crypto';

const CONSONANTS = 'bdfghklmnprstvz';
const VOWELS = 'aeiou';
const GROUPS = 5;
const SYLLABLES = 2;

function letterOf(letters: string): string {
  return letters[randomInt(letters.length)];
}

function group(): string {
  return Array.from({ length: SYLLABLES }, () => letterOf(CONSONANTS) + letterOf(VOWELS)).join('');
}

/**
 * A random password that can be read aloud and typed from a screen, such as `tavo-mire-kusa-lopi-neda`: 62 bits,
 * more than enough behind a slow hash and a limit of attempts.
 */
export function readablePassword(): string {
  return Array.from({ length: GROUPS }, group).join('-');
}
