import { existsSync } from 'node:fs';
import { dirname, join } from 'node:path';

function find(folder: string): string {
  if (existsSync(join(folder, 'package.json'))) return folder;
  const parent = dirname(folder);
  if (parent === folder) throw new Error('no package.json above this file');
  return find(parent);
}

/** The project's folder, the same from a source and from a bundle, which lies elsewhere. */
export const packageRoot = find(import.meta.dirname);
