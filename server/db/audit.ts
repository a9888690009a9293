import type { Executor } from './client';
import { audit } from './schema';

export interface AuditEntry {
  /** Undefined where the server acts by itself, or nobody is signed in. */
  readonly personId?: string;
  /** What was done, such as `membership.set`. */
  readonly action: string;
  readonly objectKind: string;
  readonly objectId: string;
  readonly data?: Record<string, unknown>;
  readonly requestId?: string;
}

/** Writes down who did what; in the transaction that does it, so that neither stands without the other. */
export async function recordInAudit(tx: Executor, entry: AuditEntry): Promise<void> {
  await tx.insert(audit).values(entry);
}
