export { DEFAULT_ITERATION_LIMIT, EigenvalueSolver } from './eigenvalues';
export {
  EigenvalueIterationError,
  NonFiniteMatrixError,
  NonFinitePolynomialError,
  ZeroPolynomialError,
} from './errors';
export { factorLu, solveLu } from './lu';
export { PolynomialRootSolver } from './polynomial-roots';
export { eigenvalueResidualRatio } from './residual';
export { sortPoles } from './sort-poles';
