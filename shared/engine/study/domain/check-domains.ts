import { ExpansionLimitError, type Program } from '../../../expressions';
import type { ComposedParameter } from '../composed-study';
import type { NodeSite } from '../expression-compiler';
import type { FaultList } from '../fault-list';
import type { NominalValues } from '../nominal-values';
import { pointText } from '../point-text';
import type { BandBox } from './band-box';
import { decideByIntervals, isMetByIntervals } from './decide-by-intervals';
import { decideExactly } from './decide-exactly';
import { exactSubject } from './exact-subject';
import { coneOf } from './interval-values';
import { operationConditions } from './partial-operations';
import { isBroken, MET, OPEN, subjectNodes, type Decision, type SignCondition } from './sign-condition';
import { coefficientCount } from './scaled-bernstein';

/** Largest tensor of coefficients that is worth forming; beyond it intervals decide. */
const MOST_EXACT_COEFFICIENTS = 5000;

export interface DomainStudy {
  readonly program: Program;
  readonly parameters: readonly ComposedParameter[];
  readonly nominal: NominalValues;
  /** Operations that are not defined everywhere. */
  readonly partial: readonly NodeSite[];
  /** All expressions. */
  readonly roots: readonly NodeSite[];
  /** What must hold besides: matrices, lags and delays. */
  readonly conditions: readonly SignCondition[];
}

/**
 * Faults of a study that is not defined everywhere in its bands, each with a point.
 *
 * @returns whether something could be neither excluded nor exhibited
 */
export function checkDomains(study: DomainStudy, faults: FaultList): boolean {
  const { program, partial, nominal, roots } = study;
  const judge = new ConditionJudge(study);
  const before = faults.count;
  let undecided = false;
  const judgeAll = (conditions: readonly SignCondition[]): void => {
    for (const condition of conditions) {
      const decision = judge.decide(condition, faults);
      if (decision.outcome === 'broken')
        faults.add(condition.path, condition.message(judge.shown(condition, decision.point)));
      else if (decision.outcome === 'open') undecided = true;
    }
  };
  judgeAll(partial.flatMap((site) => operationConditions(program, site, nominal)));
  // Where an entry is not defined, a determinant made of it means nothing.
  if (faults.count > before) return undecided;
  for (const { node, path } of roots) {
    if (!Number.isFinite(nominal.value(node)))
      faults.add(path, 'is too large for a number at the nominal values');
  }
  if (faults.count === before) judgeAll(study.conditions);
  return undecided;
}

class ConditionJudge {
  private readonly nominals: readonly number[];

  constructor(private readonly study: DomainStudy) {
    this.nominals = study.parameters.map(({ nominal }) => nominal);
  }

  decide(condition: SignCondition, faults: FaultList): Decision {
    const variables = this.variablesOf(condition);
    if (variables.length === 0 && condition.subject.kind === 'node') {
      return this.decideConstant(condition, condition.subject.node);
    }
    const { parameters, program } = this.study;
    const box: BandBox = {
      low: variables.map((index) => parameters[index].low),
      high: variables.map((index) => parameters[index].high),
    };
    const nominal = variables.map((index) => this.nominals[index]);
    const where = { nominals: this.nominals, variables, box };
    // One look at the whole box is enough for most conditions, and cheaper than an expansion.
    if (isMetByIntervals(program, condition, where)) return MET;
    const byIntervals = (): Decision => decideByIntervals(program, condition, where);
    try {
      const polynomial = exactSubject(program, condition.subject, condition.sign, this.nominals, variables);
      if (polynomial === undefined) return byIntervals();
      if (coefficientCount(polynomial) > MOST_EXACT_COEFFICIENTS) return byIntervals();
      return decideExactly(polynomial, condition.sign, box, nominal);
    } catch (error) {
      if (error instanceof RangeError) return OPEN;
      if (!(error instanceof ExpansionLimitError)) throw error;
      if (condition.subject.kind === 'node') return byIntervals();
      faults.add(['machine'], `is too large: ${error.message}`);
      return MET;
    }
  }

  /** The point of a decision, as it stands in a message: the parameters that enter. */
  shown(condition: SignCondition, point: readonly number[]): string {
    return pointText(this.study.parameters, this.variablesOf(condition), point);
  }

  private decideConstant({ sign }: SignCondition, node: number): Decision {
    const value = this.study.nominal.value(node);
    // What is not a number has a fault of its own, further in.
    if (Number.isNaN(value)) return MET;
    return isBroken(sign, Math.sign(value)) ? { outcome: 'broken', point: [] } : MET;
  }

  private variablesOf({ subject }: SignCondition): number[] {
    const { program, parameters } = this.study;
    const entering = new Set<number>();
    for (const id of coneOf(program, subjectNodes(subject))) {
      if (program.operations[id] === 'parameter') entering.add(program.left[id]);
    }
    return [...entering].filter((index) => parameters[index].hasBand).sort((a, b) => a - b);
  }
}
