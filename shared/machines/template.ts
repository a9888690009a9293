import type { CustomMachine, ParameterKind, TemplateId } from '../contracts';

/** A parameter of a template, with what a form needs to ask for it. Numbers are starting values in `unit`, not limits. */
export interface TemplateParameter {
  readonly id: string;
  readonly label: string;
  /** The symbol in drawings and equations. */
  readonly symbol: string;
  readonly unit: string;
  readonly nominal: number;
  readonly low?: number;
  readonly high?: number;
  readonly minimum?: number;
  readonly maximum?: number;
  readonly kind?: ParameterKind;
  readonly hint: string;
}

/** What a coordinate, state, input or output of a template stands for. */
export interface TemplateSignal {
  readonly label: string;
  readonly unit: string;
}

/** A machine that people choose by name. Its equations are written in the language of a custom machine. */
export interface MachineTemplate {
  readonly id: TemplateId;
  readonly label: string;
  readonly purpose: string;
  /** What the equations leave out, so that people can judge whether the template suits their machine. */
  readonly leavesOut: string;
  readonly source?: string;
  readonly parameters: readonly TemplateParameter[];
  /** By the name of the coordinate, state, input or output. */
  readonly signals: Readonly<Record<string, TemplateSignal>>;
  readonly machine: CustomMachine;
}
