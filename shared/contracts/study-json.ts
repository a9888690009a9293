import { StudyFaultError, type Fault } from './fault';
import { scanJson } from './json-scan';
import { formatPath, ROOT_PATH } from './path';

/** The largest study file, in bytes of UTF-8. */
export const LARGEST_STUDY = 1024 * 1024;

/** The deepest nesting of brackets in a study file. */
export const DEEPEST_NESTING = 64;

/**
 * The JSON value of a study file's text. Throws StudyFaultError for a text that is too large, empty, nested too deep,
 * not JSON, or repeats a key.
 */
export function readStudyJson(text: string): unknown {
  if (exceedsBytes(text, LARGEST_STUDY)) refuse('must not be larger than 1 MiB');
  const content = text.startsWith('\uFEFF') ? text.slice(1) : text;
  if (content.trim() === '') refuse('is empty; give a study as JSON');
  const { error, duplicateKeys } = scanJson(content, DEEPEST_NESTING);
  if (error !== undefined) refuse(`is not usable JSON: ${place(content, error.offset)}: ${error.message}`);
  if (duplicateKeys.length > 0) {
    throw new StudyFaultError(
      duplicateKeys.map((path): Fault => ({
        path: formatPath(path),
        message: 'stands twice in the same object',
      })),
    );
  }
  return JSON.parse(content);
}

function refuse(message: string): never {
  throw new StudyFaultError([{ path: ROOT_PATH, message }]);
}

/** Whether the text takes more than `limit` bytes in UTF-8. */
function exceedsBytes(text: string, limit: number): boolean {
  if (text.length > limit) return true;
  if (text.length * 3 <= limit) return false;
  let bytes = 0;
  for (const character of text) {
    const point = character.codePointAt(0) ?? 0;
    bytes += point < 0x80 ? 1 : point < 0x800 ? 2 : point < 0x10000 ? 3 : 4;
  }
  return bytes > limit;
}

function place(text: string, offset: number): string {
  const before = text.slice(0, offset);
  const line = before.split('\n').length;
  return `line ${line}, column ${offset - before.lastIndexOf('\n')}`;
}
