import { createHash } from 'node:crypto';
import {
  answerText,
  canonicalText,
  readStudyValue,
  type Study,
  StudyFaultError,
  type Warning,
} from '../../shared/contracts';
import { studyUnusable } from './problem';

/** A study that came in a request: its one text, and what identifies it and its answers. */
export interface ArrivingStudy {
  readonly study: Study;
  /** Canonical. */
  readonly text: string;
  /** `sha256:` and the hash of the canonical text, as results state it. */
  readonly hash: string;
  /** The same of what the answers depend on. */
  readonly answerHash: string;
  readonly warnings: readonly Warning[];
}

export function sha256(text: string): string {
  return `sha256:${createHash('sha256').update(text).digest('hex')}`;
}

/** @throws Problem study-unusable with every fault that can be seen without the engine */
export function readArrivingStudy(value: unknown): ArrivingStudy {
  const { study, warnings } = usable(() => readStudyValue(value));
  const text = canonicalText(study);
  return { study, text, warnings, hash: sha256(text), answerHash: sha256(answerText(study)) };
}

function usable<T>(read: () => T): T {
  try {
    return read();
  } catch (error) {
    throw asProblem(error);
  }
}

/** Faults of a study as a problem; any other error as it is. */
export function asProblem(error: unknown): Error {
  if (error instanceof StudyFaultError) return studyUnusable(error.faults);
  return error instanceof Error ? error : new Error('something was thrown that is no error');
}
