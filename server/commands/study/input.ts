import { createReadStream, existsSync } from 'node:fs';
import { isAbsolute, join } from 'node:path';
import process from 'node:process';
import { LARGEST_STUDY } from '../../../shared/contracts';
import { UsageError } from './arguments';

/**
 * The text of a study file or of standard input. Reading stops a little past the largest study that is accepted, so
 * that a wrong file of any size is refused at once.
 * @throws UsageError where the file cannot be read
 */
export async function readInput(file: string): Promise<string> {
  const source = file === '-' ? process.stdin : createReadStream(located(file));
  const chunks: Buffer[] = [];
  let length = 0;
  try {
    for await (const chunk of source) {
      const bytes = Buffer.from(chunk as Uint8Array);
      chunks.push(bytes);
      length += bytes.length;
      if (length > LARGEST_STUDY + 1) break;
    }
  } catch (error) {
    throw new UsageError(
      `${file}: cannot be read (${error instanceof Error ? error.message : String(error)})`,
    );
  }
  return Buffer.concat(chunks).toString('utf8');
}

/** npm runs scripts from the project's folder; a relative path may be meant from where the person stands. */
function located(file: string): string {
  const start = process.env['INIT_CWD'];
  if (isAbsolute(file) || existsSync(file) || start === undefined) return file;
  return join(start, file);
}
