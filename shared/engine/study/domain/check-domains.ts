import { evaluateInterval, ExpansionLimitError, type NodeId, type Program } from '../../../expressions';
import { isDomainIssue } from '../../../expressions/interval';
import type { ComposedParameter } from '../composed-study';
import type { NodeSite } from '../expression-compiler';
import type { FaultList } from '../fault-list';
import type { NominalValues } from '../../loop/nominal-values';
import { pointText } from '../point-text';
import type { BandBox } from './band-box';
import { IntervalSearch } from './decide-by-intervals';
import { decideExactly } from './decide-exactly';
import { exactSubject } from './exact-subject';
import { operationConditions } from './partial-operations';
import { isBroken, MET, OPEN, subjectNodes, type Decision, type SignCondition } from './sign-condition';
import { coefficientCount } from './scaled-bernstein';
import { parametersBelow, subProgram } from './sub-program';

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
  let broken = false;
  let undecided = false;
  const judgeAll = (conditions: readonly SignCondition[]): void => {
    for (const condition of conditions) {
      const decision = judge.decide(condition, faults);
      if (decision.outcome === 'open') undecided = true;
      if (decision.outcome !== 'broken') continue;
      broken = true;
      faults.add(condition.path, condition.message(judge.shown(condition, decision.point)));
    }
  };
  const mayBeNegative = (node: NodeId): boolean => judge.mayBeNegative(node);
  judgeAll(partial.flatMap((site) => operationConditions(program, site, nominal, mayBeNegative)));
  // Where an entry is not defined, what is made of it means nothing.
  if (broken) return undecided;
  for (const { node, path } of roots) {
    if (Number.isFinite(nominal.value(node))) continue;
    broken = true;
    faults.add(path, 'is too large for a number at the nominal values');
  }
  if (!broken) judgeAll(study.conditions);
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
    const byIntervals = new IntervalSearch(program, condition, { nominals: this.nominals, variables, box });
    // One look at the whole box is enough for most conditions, and cheaper than an expansion.
    if (byIntervals.isMetOnWhole()) return MET;
    try {
      const polynomial = exactSubject(program, condition.subject, condition.sign, this.nominals, variables);
      if (polynomial === undefined) return byIntervals.decide();
      if (coefficientCount(polynomial) > MOST_EXACT_COEFFICIENTS) return byIntervals.decide();
      return decideExactly(polynomial, condition.sign, box, nominal);
    } catch (error) {
      if (error instanceof RangeError) return OPEN;
      if (!(error instanceof ExpansionLimitError)) throw error;
      if (condition.subject.kind === 'node') return byIntervals.decide();
      faults.add(['machine'], `is too large: ${error.message}`);
      return MET;
    }
  }

  /** Whether intervals cannot show that a node is at least 0 everywhere in the bands. */
  mayBeNegative(node: NodeId): boolean {
    const { parameters, program } = this.study;
    const sub = subProgram(program, [node]);
    const values = evaluateInterval(sub.program, parameters);
    const value = values[values.length - 1];
    return isDomainIssue(value) || value.low < 0;
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
    return parametersBelow(program, subjectNodes(subject)).filter((index) => parameters[index].hasBand);
  }
}
