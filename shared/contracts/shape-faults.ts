import type { z } from 'zod';
import type { Fault } from './fault';
import { formatPath } from './path';

type Issue = z.core.$ZodIssue;

/**
 * Faults for what a schema refused. Where a value may take one of several shapes, the shape that it visibly has (a law
 * or a list of laws) is the one whose faults are told.
 */
export function shapeFaults(issues: readonly Issue[], at: readonly PropertyKey[] = []): Fault[] {
  return issues.flatMap((issue) => {
    const path = [...at, ...issue.path];
    if (issue.code === 'invalid_union') {
      const likely = issue.errors.filter((branch) => !branch.some(isOtherShape));
      if (likely.length === 1) return shapeFaults(likely[0], path);
    }
    return [{ path: formatPath(path), message: issue.message }];
  });
}

function isOtherShape(issue: Issue): boolean {
  return issue.path.length === 0 && (issue.code === 'invalid_type' || issue.code === 'invalid_union');
}
