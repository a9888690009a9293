/** The command was called in a way that it does not understand, or its file cannot be read. */
export class UsageError extends Error {
  override readonly name = 'UsageError';
}

export interface StudyArguments {
  /** Path of the study, `-` for standard input. */
  readonly file: string;
  readonly map: boolean;
  readonly pretty: boolean;
  readonly require: boolean;
}

const OPTIONS = ['--map', '--pretty', '--require'];
const USAGE = `usage: npm run --silent study -- FILE ${OPTIONS.map((option) => `[${option}]`).join(' ')}`;

/** @throws UsageError for an unknown option, and unless exactly one file is named */
export function readArguments(words: readonly string[]): StudyArguments {
  const options = words.filter((word) => word.startsWith('-') && word !== '-');
  const files = words.filter((word) => !options.includes(word));
  const unknown = options.find((option) => !OPTIONS.includes(option));
  if (unknown !== undefined) throw new UsageError(`unknown option ${unknown}; ${USAGE}`);
  const [file, ...more] = files;
  if (file === undefined || more.length > 0) throw new UsageError(USAGE);
  return {
    file,
    map: options.includes('--map'),
    pretty: options.includes('--pretty'),
    require: options.includes('--require'),
  };
}
