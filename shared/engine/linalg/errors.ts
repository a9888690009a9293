/** A matrix handed to a numerical routine holds NaN or an infinity. */
export class NonFiniteMatrixError extends Error {
  override readonly name = 'NonFiniteMatrixError';

  constructor(
    readonly row: number,
    readonly column: number,
  ) {
    super(`matrix entry (${row}, ${column}) is not finite`);
  }
}

/** The QR iteration reached its limit before `unresolved` eigenvalues had separated. */
export class EigenvalueIterationError extends Error {
  override readonly name = 'EigenvalueIterationError';

  constructor(
    readonly unresolved: number,
    readonly iterationLimit: number,
  ) {
    super(`${unresolved} eigenvalues did not separate within ${iterationLimit} QR steps each`);
  }
}

/** A polynomial handed to the root finder has a coefficient that is NaN or infinite. */
export class NonFinitePolynomialError extends Error {
  override readonly name = 'NonFinitePolynomialError';

  constructor(readonly power: number) {
    super(`polynomial coefficient of power ${power} is not finite`);
  }
}

/** Every coefficient is zero: each number is a root, so there is no list of them. */
export class ZeroPolynomialError extends Error {
  override readonly name = 'ZeroPolynomialError';

  constructor() {
    super('the zero polynomial has no list of roots');
  }
}
