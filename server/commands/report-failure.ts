import process from 'node:process';
import { SchemaMismatchError } from '../db';
import { ListenError } from '../main';
import { ConfigurationError } from '../platform/configuration';
import { SetupFailure } from './bootstrap/setup-failure.mjs';

/** As the entry of every script has it: the command could not be set up. */
const SETUP_FAILED = 3;

/** Failures whose message is all that the person needs; anything else is a fault of the program. */
const EXPECTED = [SetupFailure, ConfigurationError, SchemaMismatchError, ListenError];

/**
 * Tells why a command could not begin.
 *
 * @returns the exit status
 * @throws the failure itself where it is none of those that a person can put right
 */
export function reportFailure(failure: unknown): number {
  if (!(failure instanceof Error) || !EXPECTED.some((kind) => failure instanceof kind)) throw failure;
  for (const line of failure.message.split('\n')) process.stderr.write(`tareline: ${line}\n`);
  return SETUP_FAILED;
}
