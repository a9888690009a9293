import type { BrowserContext, ConsoleMessage, Request } from 'playwright-core';

/** What went wrong in a browser, as it happens. */
export interface Complaints {
  /** Those since the last call: errors and warnings of the console, refusals of the server, requests that left it. */
  take(): string[];
}

/** Refusals are told with their address by the answer itself. */
const REFUSED = /^Failed to load resource: the server responded with a status of \d+/;

/** Whether somebody is signed in is a question, and 401 the answer that every page begins with. */
const WHO_AM_I = '401 GET /api/session';

function isOutside(url: URL, address: string): boolean {
  return !['data:', 'blob:'].includes(url.protocol) && url.origin !== address;
}

function isEndedByThePage(request: Request): boolean {
  // A page that is left takes its requests with it, the stream of events first of all.
  return request.failure()?.errorText === 'net::ERR_ABORTED';
}

/** Watches every page of a context. The browser reports what its content security policy refuses as an error. */
export function watchForComplaints(context: BrowserContext, address: string): Complaints {
  let heard: string[] = [];
  const told = (message: ConsoleMessage) => {
    if (!['error', 'warning'].includes(message.type()) || REFUSED.test(message.text())) return;
    heard.push(`console ${message.type()}: ${message.text()}`);
  };
  context.on('console', told);
  context.on('weberror', (fault) => heard.push(`uncaught: ${fault.error().message}`));
  context.on('request', (request) => {
    const url = new URL(request.url());
    if (isOutside(url, address)) heard.push(`outside: ${url.href}`);
  });
  context.on('requestfailed', (request) => {
    if (!isEndedByThePage(request)) heard.push(`unanswered: ${request.method()} ${request.url()}`);
  });
  context.on('response', (response) => {
    const answer = `${response.status()} ${response.request().method()} ${new URL(response.url()).pathname}`;
    if (response.status() >= 400 && answer !== WHO_AM_I) heard.push(answer);
  });
  return {
    take: () => {
      const taken = heard;
      heard = [];
      return taken;
    },
  };
}
