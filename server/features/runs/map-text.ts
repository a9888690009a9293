import { setImmediate } from 'node:timers/promises';
import { type FlatMap, mapRow } from '../../jobs';

/** Nodes that are written in one go: less than a millisecond's work. */
const NODES_AT_ONCE = 2_000;

/** JSON text of a map, as a result states it; a large one is written bit by bit, between other requests. */
export async function mapText(map: FlatMap): Promise<string> {
  const { x, y, measure, others } = map;
  const sampled = others === 'anywhere' ? { others, proof: 'sampled' } : {};
  const head = JSON.stringify({ x: [...x], y: [...y], measure, ...sampled });
  const rows: string[] = [];
  let written = 0;
  for (let row = 0; row < y.length; row++) {
    rows.push(JSON.stringify(mapRow(map, row)));
    written += x.length;
    if (written >= NODES_AT_ONCE) {
      written = 0;
      await setImmediate();
    }
  }
  return `${head.slice(0, -1)},"values":[${rows.join(',')}]}`;
}
