import type { PathPart } from '../../../contracts';
import type { NodeId } from '../../../expressions';

/** What must hold everywhere in the bands. */
export type RequiredSign = 'nonzero' | 'nonnegative' | 'positive';

/** A quantity of a program: a node, the cosine of one, or the determinant of a square matrix of nodes. */
export type Subject =
  | { readonly kind: 'node'; readonly node: NodeId }
  | { readonly kind: 'cosine'; readonly node: NodeId }
  | { readonly kind: 'determinant'; readonly rows: readonly (readonly NodeId[])[] };

/** A quantity whose sign decides whether the study is defined at a point. */
export interface SignCondition {
  readonly path: readonly PathPart[];
  readonly subject: Subject;
  readonly sign: RequiredSign;
  /** The fault, given the point as ` at m = 300`, or an empty text where no parameter with a band enters. */
  readonly message: (point: string) => string;
}

export function subjectNodes(subject: Subject): readonly NodeId[] {
  return subject.kind === 'determinant' ? subject.rows.flat() : [subject.node];
}

/** Whether a quantity with this sign (−1, 0, 1) breaks the requirement. */
export function isBroken(required: RequiredSign, sign: number): boolean {
  if (required === 'nonzero') return sign === 0;
  return required === 'positive' ? sign <= 0 : sign < 0;
}

/** What a search over the bands found: the condition holds, fails at a point, or neither could be shown. */
export type Decision =
  | { readonly outcome: 'met' }
  | { readonly outcome: 'broken'; readonly point: readonly number[] }
  | { readonly outcome: 'open' };

export const MET: Decision = { outcome: 'met' };
export const OPEN: Decision = { outcome: 'open' };
