import type { Parameter, Scalar, Study } from '../../../../shared/contracts';
import {
  evaluateProgram,
  ExpressionError,
  parseExpression,
  ProgramBuilder,
} from '../../../../shared/expressions';
import { findUnit, toSi } from '../../../../shared/units';

class Unknown extends Error {}

/** What the names of a study stand for at the nominal point, in SI; expressions are evaluated with them. */
export class NominalValues {
  readonly names: ReadonlySet<string>;
  private readonly parameters: ReadonlyMap<string, Parameter>;
  private readonly definitions: Readonly<Record<string, Scalar>>;
  private readonly known = new Map<string, number>();
  private readonly underWay = new Set<string>();

  constructor(study: Study) {
    this.parameters = new Map(study.parameters.map((parameter) => [parameter.id, parameter]));
    this.definitions = study.definitions ?? {};
    this.names = new Set([...this.parameters.keys(), ...Object.keys(this.definitions)]);
  }

  /** The value of a number or expression; undefined where it has none, whatever the reason. */
  of(scalar: Scalar | undefined): number | undefined {
    if (scalar === undefined || typeof scalar === 'number') return scalar;
    try {
      const value = this.evaluate(scalar);
      return Number.isFinite(value) ? value : undefined;
    } catch (error) {
      if (error instanceof ExpressionError || error instanceof Unknown) return undefined;
      throw error;
    }
  }

  private evaluate(text: string): number {
    const program = new ProgramBuilder();
    const node = program.expression(parseExpression(text), (name) => program.constant(this.named(name)));
    const values = new Float64Array(program.operations.length);
    evaluateProgram(program, [], values);
    return values[node];
  }

  private named(name: string): number {
    const known = this.known.get(name);
    if (known !== undefined) return known;
    const parameter = this.parameters.get(name);
    const scalar =
      parameter?.nominal ?? (Object.hasOwn(this.definitions, name) ? this.definitions[name] : undefined);
    if (scalar === undefined || this.underWay.has(name)) throw new Unknown(name);
    this.underWay.add(name);
    try {
      const written = typeof scalar === 'number' ? scalar : this.evaluate(scalar);
      const unit = parameter?.unit === undefined ? undefined : findUnit(parameter.unit);
      const value = unit === undefined ? written : toSi(written, unit);
      this.known.set(name, value);
      return value;
    } finally {
      this.underWay.delete(name);
    }
  }
}
