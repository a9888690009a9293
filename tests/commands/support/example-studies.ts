import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Study } from '../../../shared/contracts';

/** The project's folder. */
export const ROOT = join(import.meta.dirname, '..', '..', '..');

const FOLDER = join(ROOT, 'examples');

export const exampleNames: readonly string[] = readdirSync(FOLDER)
  .filter((file) => file.endsWith('.json'))
  .map((file) => file.slice(0, -'.json'.length))
  .sort();

export function examplePath(name: string): string {
  return join(FOLDER, `${name}.json`);
}

export function exampleText(name: string): string {
  return readFileSync(examplePath(name), 'utf8');
}

/** The study as its file has it, to be changed by a test. */
export function exampleStudy(name: string): Study {
  return JSON.parse(exampleText(name)) as Study;
}
