import { StudyFaultError, type Fault } from '../../../../shared/contracts';
import { ExpansionLimitError } from '../../../../shared/expressions';

/** What an error says of the study; undefined where it is an error of the engine's own. */
export function faultsOf(error: unknown): readonly Fault[] | undefined {
  if (error instanceof StudyFaultError) return error.faults;
  if (error instanceof ExpansionLimitError) {
    return [{ path: 'machine', message: `is too large to expand exactly: ${error.message}` }];
  }
  return undefined;
}
