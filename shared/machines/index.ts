export type { MachineTemplate, TemplateParameter } from './template';
export { checkTemplateParameters, expandMachine, templateOf, templates } from './templates';
