import { requireChromium } from '../../../server/commands/bootstrap/chromium.mjs';
import { installPackages } from '../../../server/commands/bootstrap/packages.mjs';
import { freshPages } from '../../../server/commands/bootstrap/pages.mjs';
import { ROOT } from '../../commands/support/example-studies';

/** What every browser test needs and none of them makes: a browser, and the pages as `npm start` builds them. */
export default async function setUp(): Promise<void> {
  requireChromium();
  await freshPages(ROOT, await installPackages(ROOT));
}
