import type { ValidatorFn } from '@angular/forms';

/** As much of a schema of the contract as judging a field needs. */
interface JudgingSchema {
  safeParse(value: unknown): { success: true } | { success: false; error: { issues: { message: string }[] } };
}

/** Judges a field by the contract's own schema, so that page and server never differ. */
export function validBy(schema: JudgingSchema): ValidatorFn {
  return ({ value }) => {
    const read = schema.safeParse(value);
    if (read.success) return null;
    const empty = typeof value === 'string' && value.trim() === '';
    return { fault: empty ? 'is missing' : (read.error.issues[0]?.message ?? 'is not usable') };
  };
}
