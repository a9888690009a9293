import { createHash } from 'node:crypto';
import {
  answerText,
  canonicalText,
  readStudyValue,
  type Study,
  StudyFaultError,
} from '../../../shared/contracts';
import { studyUnusable } from '../../platform/problem';

/** A study as it is stored: its one text, and what identifies it and its answers. */
export interface StoredStudy {
  readonly study: Study;
  readonly text: string;
  /** `sha256:` and the hash of the canonical text, as results state it. */
  readonly hash: string;
  /** The same of what the answers depend on. */
  readonly answerHash: string;
}

function sha256(text: string): string {
  return `sha256:${createHash('sha256').update(text).digest('hex')}`;
}

/**
 * Reads a study that arrives in a request.
 *
 * @throws Problem study-unusable with every fault and its path
 */
export function readArrivingStudy(value: unknown): StoredStudy {
  const study = readOrRefuse(value);
  const text = canonicalText(study);
  return { study, text, hash: sha256(text), answerHash: sha256(answerText(study)) };
}

function readOrRefuse(value: unknown): Study {
  try {
    return readStudyValue(value).study;
  } catch (error) {
    if (error instanceof StudyFaultError) throw studyUnusable(error.faults);
    throw error;
  }
}
