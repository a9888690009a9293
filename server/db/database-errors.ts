/** Codes of PostgreSQL, appendix A of its manual. */
const UNIQUE_VIOLATION = '23505';
const FOREIGN_KEY_VIOLATION = '23503';
const SERIALIZATION_FAILURE = '40001';
const DEADLOCK = '40P01';
export const INSUFFICIENT_PRIVILEGE = '42501';
export const UNDEFINED_TABLE = '42P01';
export const LOCK_NOT_AVAILABLE = '55P03';

/** The error of the server inside what the query builder throws around it. */
function serverError(error: unknown): Error | undefined {
  if (!(error instanceof Error)) return undefined;
  if ('code' in error && 'severity' in error) return error;
  return serverError(error.cause);
}

/** PostgreSQL's code of an error, undefined for any other error. */
export function databaseCode(error: unknown): string | undefined {
  const found = serverError(error);
  return found !== undefined && 'code' in found && typeof found.code === 'string' ? found.code : undefined;
}

function violates(error: unknown, code: string, constraint: string): boolean {
  const found = serverError(error);
  return databaseCode(error) === code && found !== undefined && 'constraint' in found
    ? found.constraint === constraint
    : false;
}

/** Whether a unique constraint or index of that name refused the statement. */
export function isUniqueViolation(error: unknown, constraint: string): boolean {
  return violates(error, UNIQUE_VIOLATION, constraint);
}

/** Whether a foreign key of that name refused the statement. */
export function isForeignKeyViolation(error: unknown, constraint: string): boolean {
  return violates(error, FOREIGN_KEY_VIOLATION, constraint);
}

/** Whether the transaction lost against another one and may be tried again as it is. */
export function isWorthRepeating(error: unknown): boolean {
  const code = databaseCode(error);
  return code === SERIALIZATION_FAILURE || code === DEADLOCK;
}
