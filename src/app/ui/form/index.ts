export { ChoiceField, type Choice } from './choice-field';
export { FileField } from './file-field';
export { TextField } from './text-field';
