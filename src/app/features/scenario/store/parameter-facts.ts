import type { Parameter, Study } from '../../../../../shared/contracts';
import { templates } from '../../../../../shared/machines';
import { symbolParts } from '../../../forms/drawing/symbol-parts';
import { constantNumber } from './constant-number';

/** A parameter as map and lanes show it: its words, and its numbers as far as they are plain, in its own unit. */
export interface ParameterFacts {
  readonly id: string;
  readonly label: string;
  readonly symbol: string;
  readonly unit: string;
  readonly nominal: number | undefined;
  readonly low: number | undefined;
  readonly high: number | undefined;
  readonly minimum: number | undefined;
  readonly maximum: number | undefined;
  readonly hasBand: boolean;
  readonly isPayload: boolean;
}

export function parameterFacts(study: Study): ParameterFacts[] {
  return study.parameters.map((parameter) => ({
    id: parameter.id,
    label: parameter.label ?? parameter.id,
    symbol: symbolOf(study, parameter),
    unit: parameter.unit ?? '',
    nominal: constantNumber(parameter.nominal),
    low: constantNumber(parameter.low),
    high: constantNumber(parameter.high),
    minimum: constantNumber(parameter.minimum),
    maximum: constantNumber(parameter.maximum),
    hasBand: parameter.low !== undefined && parameter.high !== undefined,
    isPayload: parameter.id === study.payload,
  }));
}

/** The symbol of the template's drawing, else the name that expressions use. */
function symbolOf({ machine }: Study, { id }: Parameter): string {
  const template =
    'template' in machine ? templates.find((known) => known.id === machine.template) : undefined;
  const symbol = template?.parameters.find((parameter) => parameter.id === id)?.symbol ?? id;
  const { base, below } = symbolParts(symbol);
  return base + below.replace(/\d/g, (digit) => String.fromCharCode(0x2080 + Number(digit)));
}
