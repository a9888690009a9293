/** A command could not be made ready to run; the message is all that the person needs to see. */
export class SetupFailure extends Error {
  /** @override */
  name = 'SetupFailure';
}
