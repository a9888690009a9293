import { MEASURES, type Measure } from '../../contracts';
import type { ComposedRequirement } from '../study';

/**
 * The requirements that a search has to look at, cheapest first. Stability is part of every stricter requirement,
 * and a level that asks for no more than stability is stability.
 */
export function searchOrder(requirements: readonly ComposedRequirement[]): ComposedRequirement[] {
  const strict = requirements.filter(asksForMore);
  const cheapest = (measure: Measure): number => MEASURES.indexOf(measure);
  if (strict.length === 0) return [{ measure: 'stability', limit: 0, law: requirements[0]?.law ?? -1 }];
  return [...strict].sort((a, b) => cheapest(a.measure) - cheapest(b.measure) || a.law - b.law);
}

function asksForMore({ measure, limit }: ComposedRequirement): boolean {
  if (measure === 'stability') return false;
  return measure === 'gainMargin' ? limit > 1 : limit > 0;
}
