import type { ProductRole } from '../../../../shared/contracts/api';

/** Whether a person may change things in a product; the server asks the same again. */
export function mayDesign(role: ProductRole | null | undefined): boolean {
  return role === 'designer';
}

export const ROLE_WORDS: Record<ProductRole, string> = {
  designer: 'Designer',
  reviewer: 'Reviewer',
  viewer: 'Viewer',
};
