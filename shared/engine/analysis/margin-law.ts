import type { ComposedStudy } from '../study';

/** The law at which the nominal margins are read: the first; −1 without one. */
export function marginLaw(study: ComposedStudy): number {
  return study.loop.laws.length > 0 ? 0 : -1;
}
