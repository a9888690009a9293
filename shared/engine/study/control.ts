import {
  lawsOf,
  type Law,
  type PathPart,
  type StateFeedbackLaw,
  type Study,
  type TransferFunctionLaw,
} from '../../contracts';
import { lawPath } from '../../contracts/declared-names';
import type { NodeId } from '../../expressions';
import type { ComposedLaw, ComposedMachine, ComposedStateFeedback } from '../loop/composed';
import type { ExpressionCompiler } from './expression-compiler';
import type { FaultList } from './fault-list';
import type { NominalValues } from '../loop/nominal-values';

/** The laws of a study; none where it has no control. */
export function studyLaws(study: Study): readonly Law[] {
  return study.control === undefined ? [] : lawsOf(study.control);
}

/**
 * The laws with their numbers as nodes. Unknown inputs, outputs and states have faults of their own.
 *
 * @param nominal tells which leading coefficients are 0 throughout
 */
export function composeLaws(
  study: Study,
  machine: ComposedMachine,
  compiler: ExpressionCompiler,
  nominal: NominalValues,
  faults: FaultList,
): ComposedLaw[] {
  return studyLaws(study).map((law, index): ComposedLaw => {
    const path = lawPath(study, index);
    const { input } = law;
    switch (law.law) {
      case 'pid':
        return {
          law: 'pid',
          input,
          output: law.output,
          kp: compiler.scalar(law.kp, [...path, 'kp']),
          ki: compiler.scalar(law.ki, [...path, 'ki']),
          kd: compiler.scalar(law.kd, [...path, 'kd']),
          derivativeTime: compiler.scalar(law.derivativeTime, [...path, 'derivativeTime']),
        };
      case 'state-feedback':
        return composeStateFeedback(law, path, machine, compiler);
      case 'transfer-function':
        return {
          law: 'transfer-function',
          input,
          output: law.output,
          ...composeQuotient(law, path, compiler, nominal, faults),
        };
      case 'state-space':
        return {
          law: 'state-space',
          input,
          output: law.output,
          a: compiler.matrix(law.A, [...path, 'A']),
          b: compiler.vector(law.B, [...path, 'B']),
          c: compiler.vector(law.C, [...path, 'C']),
          d: compiler.scalar(law.D, [...path, 'D']),
        };
    }
  });
}

function composeStateFeedback(
  law: StateFeedbackLaw,
  path: readonly PathPart[],
  machine: ComposedMachine,
  compiler: ExpressionCompiler,
): ComposedStateFeedback {
  const gains = Object.entries(law.gains).flatMap(([state, scalar]) => {
    const gain = compiler.scalar(scalar, [...path, 'gains', state]);
    const dots: 0 | 1 = machine.order === 2 && state.endsWith("'") ? 1 : 0;
    const unknown = machine.names.indexOf(dots === 1 ? state.slice(0, -1) : state);
    return unknown < 0 ? [] : [{ unknown, dots, gain }];
  });
  const { integral } = law;
  return {
    law: 'state-feedback',
    input: law.input,
    gains,
    integral:
      integral === undefined
        ? undefined
        : { output: integral.output, gain: compiler.scalar(integral.gain, [...path, 'integral', 'gain']) },
  };
}

/** Numerator and denominator in ascending powers, without leading coefficients that are 0 throughout. */
function composeQuotient(
  law: TransferFunctionLaw,
  path: readonly PathPart[],
  compiler: ExpressionCompiler,
  nominal: NominalValues,
  faults: FaultList,
): { numerator: NodeId[]; denominator: NodeId[] } {
  const ascending = (key: 'numerator' | 'denominator'): NodeId[] => {
    const nodes = compiler.vector(law[key], [...path, key]).reverse();
    while (nodes.length > 0 && nominal.constant(nodes[nodes.length - 1]) === 0) nodes.pop();
    return nodes;
  };
  const before = compiler.complete;
  const numerator = ascending('numerator');
  const denominator = ascending('denominator');
  if (before === compiler.complete) {
    if (denominator.length === 0) faults.add([...path, 'denominator'], 'must not be zero');
    else if (numerator.length > denominator.length) {
      faults.add([...path, 'numerator'], 'must not be of higher degree than the denominator');
    }
  }
  return { numerator, denominator };
}
