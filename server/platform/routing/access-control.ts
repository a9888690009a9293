import type { IncomingHttpHeaders } from 'node:http';
import type { Caller, ProductAccess } from './caller';

/**
 * How routes learn who calls and whether they may. The registry knows neither sessions nor policies; the
 * application hands both in.
 *
 * @typeParam Rule what routes state as their policy
 */
export interface AccessControl<Rule> {
  /** The caller by the session of the request; undefined without a living one. */
  identify(headers: IncomingHttpHeaders): Promise<Caller | undefined>;
  /**
   * @param params the parameters of the path
   * @returns the product that the rule speaks of, where it speaks of one
   * @throws Problem unless the rule allows the call
   */
  check(
    rule: Rule,
    caller: Caller | undefined,
    params: Readonly<Record<string, string>>,
  ): Promise<ProductAccess | undefined>;
}
