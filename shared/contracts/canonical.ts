import type { Study } from './study';

/**
 * One text per study, whatever the order of keys and the white space in its file: keys sorted by code unit at every
 * level, numbers in the shortest form that reads back as the same double, keys without a value left out.
 */
export function canonicalText(study: Study): string {
  return canonical(study);
}

/** The same for a part of a study, or one that is not finished. Nested as deep as the value, so bound that first. */
export function canonicalJson(value: unknown): string {
  return canonical(value);
}

/**
 * The canonical text of what the answers depend on: the study without its name, the labels of its parameters and its
 * map.
 */
export function answerText(study: Study): string {
  return canonical({
    ...study,
    name: undefined,
    map: undefined,
    parameters: study.parameters.map((parameter) => ({ ...parameter, label: undefined })),
  });
}

function canonical(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(canonical).join(',')}]`;
  if (typeof value === 'object' && value !== null) {
    const entries = Object.entries(value)
      .filter(([, entry]) => entry !== undefined)
      .sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0))
      .map(([key, entry]) => `${JSON.stringify(key)}:${canonical(entry)}`);
    return `{${entries.join(',')}}`;
  }
  return JSON.stringify(value);
}
