import type { OrganisationRole, ProductRole } from '../../policies';
import type { ProductName } from './range';

/** The invented maker, known to its own people only. */
export const MAKER = 'Quernholm';

export interface DemoPerson {
  readonly name: string;
  readonly email: string;
  readonly organisationRole: OrganisationRole;
  /** In products; a designer of one may be a viewer of another. */
  readonly roles: Readonly<Partial<Record<ProductName, ProductRole>>>;
}

/** Who designs the product, and is its only designer in the beginning. */
export function designerOf<Person extends Pick<DemoPerson, 'roles'>>(
  people: readonly Person[],
  product: ProductName,
): Person {
  const designer = people.find(({ roles }) => roles[product] === 'designer');
  if (designer === undefined) throw new Error(`nobody designs ${product}`);
  return designer;
}

export const administrator: DemoPerson = {
  name: 'Maren Tveitlund',
  email: 'maren@quernholm.example',
  organisationRole: 'administrator',
  roles: {},
};

export const colleagues: readonly DemoPerson[] = [
  {
    name: 'Joris Hedvall',
    email: 'joris@quernholm.example',
    organisationRole: 'member',
    roles: { 'Lyft lift tables': 'designer', 'Stille cabins': 'designer', 'Skift transfer carts': 'viewer' },
  },
  {
    name: 'Petra Ostrik',
    email: 'petra@quernholm.example',
    organisationRole: 'member',
    roles: { 'Skift transfer carts': 'designer', 'Lyft lift tables': 'viewer' },
  },
  {
    name: 'Samir Aldane',
    email: 'samir@quernholm.example',
    organisationRole: 'member',
    roles: {
      'Lyft lift tables': 'reviewer',
      'Skift transfer carts': 'reviewer',
      'Stille cabins': 'reviewer',
    },
  },
  {
    name: 'Lotte Bransig',
    email: 'lotte@quernholm.example',
    organisationRole: 'member',
    roles: { 'Lyft lift tables': 'viewer', 'Skift transfer carts': 'viewer', 'Stille cabins': 'viewer' },
  },
];

/** What somebody is, in a few words: `designer of A and B, viewer of C`. */
export function roleInWords({ organisationRole, roles }: DemoPerson): string {
  if (organisationRole === 'administrator') return organisationRole;
  const products = new Map<ProductRole, string[]>();
  for (const [product, role] of Object.entries(roles)) {
    products.set(role, [...(products.get(role) ?? []), product]);
  }
  return [...products].map(([role, names]) => `${role} of ${listed(names)}`).join('; ');
}

function listed(names: readonly string[]): string {
  const last = names.at(-1) ?? '';
  return names.length < 2 ? last : `${names.slice(0, -1).join(', ')} and ${last}`;
}
