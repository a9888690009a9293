export { drawingOf, type Drawing, type DrawingItem, type Point } from './drawings';
export type { MachineTemplate, TemplateParameter, TemplateSignal } from './template';
export { checkTemplateParameters, expandMachine, templateOf, templates } from './templates';
