// The database command: the private database of this checkout without the server, for a look into it.
//
//   database up      starts it and leaves it running; prints the owner's connection URL
//   database down    stops it
//
// Exit status: 0 done, 2 called in a way that it does not understand.

import process from 'node:process';
import { packageRoot } from '../platform/package-root';
import { openPrivateDatabase, stopPrivateDatabase } from './database/private-database';
import { reportFailure } from './report-failure';

const [action = ''] = process.argv.slice(2);

try {
  if (action === 'up') process.stdout.write(`${(await openPrivateDatabase(packageRoot)).ownerUrl}\n`);
  else if (action === 'down') {
    const ran = await stopPrivateDatabase(packageRoot);
    process.stderr.write(`tareline: the database ${ran ? 'is stopped' : 'was not running'}\n`);
  } else {
    process.stderr.write('usage: npm run --silent database -- up | down\n');
    process.exitCode = 2;
  }
} catch (error) {
  process.exitCode = reportFailure(error);
}
