import { ExactEvaluator } from '../../expressions';
import { LoopProbe } from '../contact/loop-probe';
import { DivisorProblem } from '../contact/divisor-problem';
import { RequirementProblem } from '../contact/requirement-problem';
import { buildLoop } from '../loop/build-loop';
import type { LoopMatrix } from '../loop/loop-matrix';
import { NominalValues } from '../loop/nominal-values';
import { expandLoop, type LoopPolynomial } from '../polynomial/loop-polynomial';
import type { ComposedRequirement, ComposedStudy } from '../study';
import type { SearchSpace } from './search-variables';

/** The closed loop of a study over its search space: numeric at points, exact as polynomials where it is rational. */
export class LoopModel {
  readonly loop: LoopMatrix;
  readonly nominalParameters: Float64Array;
  private readonly evaluator: ExactEvaluator;
  private readonly probes = new Map<number, LoopProbe>();
  private readonly polynomials = new Map<number, LoopPolynomial | undefined>();

  /** @throws ExpansionLimitError from the members that expand, where the loop is too large */
  constructor(
    study: ComposedStudy,
    private readonly space: SearchSpace,
  ) {
    this.nominalParameters = Float64Array.from(study.parameters, ({ nominal }) => nominal);
    const constants = new NominalValues(study.program, this.nominalParameters, (parameter) =>
      space.parameters.includes(parameter),
    );
    this.loop = buildLoop(study.loop, (node) => constants.constant(node));
    this.evaluator = new ExactEvaluator(study.program, this.nominalParameters, space.parameters);
  }

  /** The numeric measures with one law's loop as the place where margins are read. */
  probe(law: number): LoopProbe {
    let probe = this.probes.get(law);
    if (probe === undefined) {
      probe = new LoopProbe(this.loop, law, this.nominalParameters, this.space.parameters);
      this.probes.set(law, probe);
    }
    return probe;
  }

  /** d + κ n with κ at one law; undefined where a variable enters otherwise than rationally. */
  polynomial(law: number): LoopPolynomial | undefined {
    if (!this.polynomials.has(law)) this.polynomials.set(law, expandLoop(this.loop, this.evaluator, law));
    return this.polynomials.get(law);
  }

  /**
   * A requirement made ready for the contact search.
   * @param widest largest absolute value that each variable takes in any search
   */
  problem(
    { measure, limit, law }: ComposedRequirement,
    widest: readonly number[],
  ): RequirementProblem | undefined {
    const polynomial = this.polynomial(law);
    if (polynomial === undefined) return undefined;
    return new RequirementProblem(measure, limit, this.probe(law), polynomial, this.space.nominal, widest);
  }

  /** That no divisor of the loop's entries vanishes. */
  divisorProblems(law: number, widest: readonly number[]): DivisorProblem[] {
    const divisors = this.polynomial(law)?.divisors ?? [];
    return divisors.map(
      (divisor) => new DivisorProblem(divisor, this.probe(law), this.space.nominal, widest),
    );
  }
}
