/** Who a request comes from, as its session tells. */
export interface Caller {
  readonly personId: string;
  readonly sessionId: string;
  readonly name: string;
  readonly email: string;
  readonly organisationRole: 'administrator' | 'member';
  readonly mayCreateProducts: boolean;
}

/** The product that a route's rule speaks of, and the caller's role in it. */
export interface ProductAccess {
  readonly id: string;
  /** Undefined for an administrator who has no role in this product. */
  readonly role: 'designer' | 'reviewer' | 'viewer' | undefined;
}
