export { Cautions } from './cautions';
export {
  failsAbove,
  failsBelow,
  plainFigure,
  provedFrom,
  provedTo,
  reserveFigure,
  withMinus,
  withUnit,
} from './figure';
export { mayDesign, ROLE_WORDS } from './may';
export { provedText, rangesInWords, rangesOfRun, reserveOf } from './run-ranges';
export {
  measureWords,
  proofWords,
  RUN_STATE_WORDS,
  verdictOf,
  verdictWords,
  type VerdictFacts,
} from './words';
