import { checkNames, isTemplateMachine, type Study, type Warning } from '../../contracts';
import { checkTemplateParameters, expandMachine } from '../../machines';
import type { ComposedLoop } from '../loop/composed';
import type { ComposedParameter, ComposedStudy } from './composed-study';
import { composeLaws, studyLaws } from './control';
import { checkDomains } from './domain/check-domains';
import { ExpressionCompiler } from './expression-compiler';
import { FaultList } from './fault-list';
import { checkTimes, composeHardware } from './hardware';
import { leadingConditions, matrixConditions, timeConditions } from './loop-conditions';
import { checkLoopSize } from './loop-size';
import { composeMachine } from './machine';
import { composeMap } from './map';
import { NominalValues } from '../loop/nominal-values';
import { composeNames } from './parameters';
import { composeRating } from './rating';
import { composeRequirements } from './requirements';
import { composeSearches } from './searches';

/**
 * A study that `readStudy` has accepted, as the engine computes with it.
 *
 * @throws StudyFaultError with every fault that needs an expression or the bands to be seen
 */
export function composeStudy(study: Study): ComposedStudy {
  const faults = new FaultList();
  const warnings: Warning[] = [];
  const machine = expandMachine(study.machine);
  if (isTemplateMachine(study.machine)) faults.addAll(checkNames(study, machine));
  const lacking = checkTemplateParameters(
    study.machine,
    new Set([...study.parameters.map(({ id }) => id), ...Object.keys(study.definitions ?? {})]),
  );
  faults.addAll(lacking);

  const names = composeNames(study, faults);
  const { exact } = names;
  const payload = study.parameters.findIndex(({ id }) => id === study.payload);
  const inputs = studyLaws(study).map(({ input }) => input);
  const searches = composeSearches(study, names.parameters[payload], exact, faults, warnings);
  const requirements = composeRequirements(study.requirements, ['requirements'], inputs, exact, faults);
  const rating = composeRating(study, names.parameters[payload]?.unit, inputs, exact, faults);
  const map = composeMap(study, names.parameters, exact, faults);

  const compiler = new ExpressionCompiler(faults);
  study.parameters.forEach(({ id }, index) => compiler.define(id, compiler.program.parameter(index)));
  for (const name of Object.keys(study.definitions ?? {})) compiler.define(name, undefined);
  for (const [name, tree] of names.definitions) {
    compiler.define(name, compiler.expression(tree, ['definitions', name]));
  }
  // Without its parameters a template has nothing but unknown names.
  if (lacking.length > 0) faults.refuse();
  const varying = new Set([study.payload, study.map?.x, study.map?.y]);
  const nominal = new NominalValues(
    compiler.program,
    names.parameters.map((parameter) => parameter?.nominal ?? NaN),
    (index) => names.parameters[index]?.hasBand === true || varying.has(study.parameters[index].id),
  );
  const composedMachine = composeMachine(study, machine, compiler);
  const laws = composeLaws(study, composedMachine, compiler, nominal, faults);
  const { times, ...hardware } = composeHardware(study, laws, compiler);
  const loop: ComposedLoop = { program: compiler.program, machine: composedMachine, laws, ...hardware };

  const parameters = names.parameters.filter(
    (parameter): parameter is ComposedParameter => parameter !== undefined,
  );
  if (parameters.length < study.parameters.length) faults.refuse();
  checkTimes(times, nominal, faults);
  const sizeFaults = faults.count;
  if (compiler.complete) checkLoopSize(loop, (node) => nominal.constant(node), faults);
  const isExpandable = compiler.complete && faults.count === sizeFaults;
  const { program, partial, roots } = compiler;
  const boundsUndecided = checkDomains(
    {
      program,
      parameters,
      nominal,
      partial,
      roots,
      conditions: [
        ...timeConditions(times, nominal),
        ...leadingConditions(study, laws, nominal),
        ...(isExpandable ? matrixConditions(study, machine, composedMachine) : []),
      ],
    },
    faults,
  );
  faults.refuse();
  return {
    program,
    parameters,
    payload: payload < 0 ? undefined : payload,
    ...searches,
    loop,
    requirements,
    rating: payload < 0 ? undefined : rating,
    map,
    boundsUndecided,
    warnings,
  };
}
