import { readdirSync, readFileSync } from 'node:fs';
import { basename, join } from 'node:path';
import { readStudy } from '../../shared/contracts';
import { composeStudy, type ComposedStudy } from '../../shared/engine';

/** The project's folder: the bundle in dist/commands lies as deep as this file. */
export const ROOT = join(import.meta.dirname, '..', '..');

export interface Example {
  readonly name: string;
  readonly file: string;
  readonly study: ComposedStudy;
}

/** Every study under examples/, composed. */
export function loadExamples(): Example[] {
  const folder = join(ROOT, 'examples');
  return readdirSync(folder)
    .filter((file) => file.endsWith('.json'))
    .sort()
    .map((file) => {
      const path = join(folder, file);
      return {
        name: basename(file, '.json'),
        file: path,
        study: composeStudy(readStudy(readFileSync(path, 'utf8')).study),
      };
    });
}
