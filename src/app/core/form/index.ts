export { validBy } from './schema-validator';
export { submission, type Submission } from './submission';
