// What the web worker runs: the engine, asked from the page.

import type { EngineRequest } from '../engine-messages';
import { EngineDesk } from './engine-desk';

// A message to oneself comes after those of the page that are waiting already, and without a timer's least delay.
const { port1: turns, port2: ownMail } = new MessageChannel();

const desk = new EngineDesk({
  reply: (reply) => postMessage(reply),
  clock: () => performance.now(),
  askForTurn: () => ownMail.postMessage(undefined),
});

turns.onmessage = () => desk.takeTurn();
addEventListener('message', ({ data }: MessageEvent<EngineRequest>) => desk.receive(data));
