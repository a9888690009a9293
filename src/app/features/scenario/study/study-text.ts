import type { Control, Requirement, Scalar, Study } from '../../../../../shared/contracts';
import { templates } from '../../../../../shared/machines';
import { measureWords, plainFigure, withMinus, withUnit } from '../../../core/answers';
import type { Fact } from '../answers/answers-of';

/** A number as it is shown, an expression as it was written. */
export function scalarText(value: Scalar): string {
  return typeof value === 'number' ? plainFigure(value) : withMinus(value);
}

export function machineText({ machine }: Study): string {
  if ('template' in machine)
    return templates.find(({ id }) => id === machine.template)?.label ?? machine.template;
  return 'coordinates' in machine
    ? `Own machine, coordinates ${machine.coordinates.join(', ')}`
    : `Own machine, states ${machine.states.join(', ')}`;
}

export function controlFacts({ control, sampling, actuator, sensor }: Study): Fact[] {
  const laws = control === undefined ? [] : Array.isArray(control) ? control : [control];
  const facts = laws.flatMap(lawFacts);
  if (sampling !== undefined) facts.push({ label: 'Sampling period', text: seconds(sampling.period) });
  const paths = [
    ...(actuator === undefined ? [] : Array.isArray(actuator) ? actuator : [actuator]).map(
      (path) => ['Drive', path] as const,
    ),
    ...(sensor === undefined ? [] : [['Sensor', sensor] as const]),
  ];
  for (const [name, { lag, delay }] of paths) {
    if (lag !== undefined) facts.push({ label: `${name} lag`, text: seconds(lag) });
    if (delay !== undefined) facts.push({ label: `${name} delay`, text: seconds(delay) });
  }
  return facts;
}

export function requirementFacts(requirements: readonly Requirement[]): Fact[] {
  return requirements.map((requirement) => {
    const words = measureWords(requirement.measure);
    const label = words.charAt(0).toUpperCase() + words.slice(1);
    if (requirement.measure === 'stability') return { label, text: 'required' };
    const unit = { decayRate: '1/s', phaseMargin: 'rad' }[requirement.measure as string];
    return { label, text: `≥ ${withUnit(scalarText(requirement.atLeast), unit)}` };
  });
}

export function ratingFacts({ rating, parameters, payload }: Study): Fact[] {
  if (rating === undefined) return [];
  const unit = parameters.find(({ id }) => id === payload)?.unit;
  return [
    ...(rating.payload === undefined
      ? []
      : [{ label: 'Rated payload', text: withUnit(scalarText(rating.payload), unit) }]),
    ...(rating.step === undefined
      ? []
      : [{ label: 'Plate step', text: withUnit(scalarText(rating.step), unit) }]),
    ...(rating.tests ?? []).map(({ name, factor, clause }) => ({
      label: `Test, ${name}${clause === undefined || clause === '' ? '' : ` (${clause})`}`,
      text: `× ${scalarText(factor)}`,
    })),
  ];
}

type Law = Exclude<Control, readonly unknown[]>;

function lawFacts(law: Law): Fact[] {
  switch (law.law) {
    case 'pid':
      return [
        { label: 'PID', text: `${law.output} to ${law.input}` },
        { label: 'Proportional', text: scalarText(law.kp) },
        { label: 'Integral', text: scalarText(law.ki) },
        { label: 'Derivative', text: scalarText(law.kd) },
        ...(law.derivativeTime === undefined
          ? []
          : [{ label: 'Derivative time', text: seconds(law.derivativeTime) }]),
      ];
    case 'state-feedback':
      return [
        { label: 'State feedback', text: `to ${law.input}` },
        ...Object.entries(law.gains).map(([state, gain]) => ({
          label: `Gain on ${state}`,
          text: scalarText(gain),
        })),
        ...(law.integral === undefined
          ? []
          : [{ label: `Integral of ${law.integral.output}`, text: scalarText(law.integral.gain) }]),
      ];
    case 'transfer-function':
      return [
        { label: 'Transfer function', text: `${law.output} to ${law.input}` },
        { label: 'Numerator', text: law.numerator.map(scalarText).join(', ') },
        { label: 'Denominator', text: law.denominator.map(scalarText).join(', ') },
      ];
    case 'state-space':
      return [{ label: 'State-space law', text: `${law.output} to ${law.input}, ${law.A.length} states` }];
  }
}

function seconds(value: Scalar): string {
  return typeof value === 'number' ? withUnit(plainFigure(value), 's') : scalarText(value);
}
