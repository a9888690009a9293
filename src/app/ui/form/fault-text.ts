import type { ValidationErrors } from '@angular/forms';

/**
 * The sentence under a field. Validators of this product put what is wrong under the key `fault`, as the end of a
 * sentence that starts with the field's name: "must have at least 12 characters".
 */
export function faultText(label: string, errors: ValidationErrors | null): string {
  if (errors === null) return '';
  const fault: unknown = errors['fault'];
  return typeof fault === 'string' ? `${label} ${fault}.` : `${label} is not usable.`;
}
