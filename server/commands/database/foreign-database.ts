import { roleOf } from '../../db/roles';
import type { DatabaseConfiguration } from '../../platform/configuration';

/** A database on a server that is not ours. */
export interface ForeignDatabase {
  readonly ownerUrl: string;
  readonly url: string;
  /** The application's role, undefined where it is the owner as well. */
  readonly applicationRole: string | undefined;
}

/** @returns undefined where no foreign server is configured */
export function foreignDatabase({ url, ownerUrl }: DatabaseConfiguration): ForeignDatabase | undefined {
  if (url === undefined) return undefined;
  const owner = ownerUrl ?? url;
  return {
    url,
    ownerUrl: owner,
    applicationRole: roleOf(owner) === roleOf(url) ? undefined : roleOf(url),
  };
}
