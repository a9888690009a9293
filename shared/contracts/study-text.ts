import { checkDeclaredNames } from './declared-names';
import { StudyFaultError, type Fault, type Warning } from './fault';
import { checkLiteralNumbers } from './literal-numbers';
import { isTemplateMachine } from './machine';
import { machineForm } from './machine-form';
import { checkNames } from './machine-names';
import { checkSizes } from './matrix-sizes';
import { ROOT_PATH } from './path';
import { shapeFaults } from './shape-faults';
import { STUDY_FORMAT, STUDY_VERSION, studySchema, type Study } from './study';
import { readStudyJson } from './study-json';
import { studyWarnings } from './study-warnings';
import { unknownKeys } from './unknown-keys';
import { exceedsValues, MOST_VALUES } from './value-count';

/** More faults than this are counted, not listed. */
const MOST_FAULTS = 100;

export interface ReadStudy {
  readonly study: Study;
  readonly warnings: readonly Warning[];
}

/**
 * Reads a study file. Everything that can be judged without evaluating an expression is judged here: shape, names,
 * sizes, and values given as plain numbers. Throws StudyFaultError with every fault found.
 */
export function readStudy(text: string): ReadStudy {
  return readStudyValue(readStudyJson(text));
}

/** `readStudy` for a value that is parsed already. */
export function readStudyValue(value: unknown): ReadStudy {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    throw new StudyFaultError([
      { path: ROOT_PATH, message: 'must be an object with format, version, machine, …' },
    ]);
  }
  if (exceedsValues(value, MOST_VALUES)) {
    throw new StudyFaultError([
      { path: ROOT_PATH, message: `must not hold more than ${MOST_VALUES} values` },
    ]);
  }
  refuse(formatFaults(value));
  const study = readShape(value);
  refuse([
    ...checkDeclaredNames(study),
    ...(isTemplateMachine(study.machine) ? [] : checkNames(study, study.machine)),
    ...checkSizes(study),
    ...checkLiteralNumbers(study),
  ]);
  return { study, warnings: [...unknownKeys(value, study), ...studyWarnings(study)] };
}

/** Another format or version makes every further fault meaningless, so it is told alone. */
function formatFaults(value: object): Fault[] {
  const { format, version } = studySchema.shape;
  const given = value as { format?: unknown; version?: unknown };
  const faults: Fault[] = [];
  if (!format.safeParse(given.format).success)
    faults.push({ path: 'format', message: `must be "${STUDY_FORMAT}"` });
  if (!version.safeParse(given.version).success)
    faults.push({ path: 'version', message: `must be ${STUDY_VERSION}` });
  return faults;
}

function readShape(value: object): Study {
  const form = machineForm('machine' in value ? value.machine : undefined);
  if ('message' in form) {
    const { error } = studySchema.omit({ machine: true }).safeParse(value);
    throw refusal([{ path: 'machine', message: form.message }, ...shapeFaults(error?.issues ?? [])]);
  }
  const read = studySchema.extend({ machine: form.schema }).safeParse(value);
  if (!read.success) throw refusal(shapeFaults(read.error.issues));
  return read.data;
}

function refuse(faults: readonly Fault[]): void {
  if (faults.length > 0) throw refusal(faults);
}

function refusal(faults: readonly Fault[]): StudyFaultError {
  if (faults.length <= MOST_FAULTS) return new StudyFaultError(faults);
  const rest = { path: ROOT_PATH, message: `has ${faults.length - MOST_FAULTS} more faults` };
  return new StudyFaultError([...faults.slice(0, MOST_FAULTS), rest]);
}
