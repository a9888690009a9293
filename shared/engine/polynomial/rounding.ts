/** Unit roundoff of double precision, 2⁻⁵³ (Higham 2002, section 2.2). */
export const UNIT_ROUNDOFF = 1.1102230246251565e-16;
