import type { AuditPage } from '../../../shared/contracts/api';
import type { Db } from '../../db';
import { selectEntries, selectNames } from './audit.repository';
import { entryText, idsOf } from './entry-text';

const PAGE_LENGTH = 100;

/** @param before only entries older than the one with this id; the newest where it is undefined */
export async function readAudit({ db }: { readonly db: Db }, before: number | undefined): Promise<AuditPage> {
  const found = await selectEntries(db, { before, limit: PAGE_LENGTH + 1 });
  const page = found.slice(0, PAGE_LENGTH);
  const names = await selectNames(db, [...new Set(page.flatMap(idsOf))]);
  return {
    entries: page.map((entry) => ({
      id: String(entry.id),
      at: entry.at.toISOString(),
      who: entry.who,
      action: entry.action,
      ...entryText(entry, names),
    })),
    next: found.length > PAGE_LENGTH ? String(page[PAGE_LENGTH - 1].id) : null,
  };
}
