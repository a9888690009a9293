import { z } from 'zod';
import { unavailable } from './problem';
import { route } from './routing';

export interface HealthDependencies {
  readonly version: string;
  /** What keeps the server from doing its work, in words; empty when nothing does. */
  readonly findObstacles: () => Promise<readonly string[]>;
}

const liveSchema = z.object({ status: z.literal('live'), version: z.string() });
const readySchema = z.object({ status: z.literal('ready') });

/** Whether the process answers at all, and whether it can do its work. */
export function healthRoutes({ version, findObstacles }: HealthDependencies) {
  return [
    route({
      method: 'GET',
      path: '/health',
      summary: 'Whether the server is alive',
      policy: { scope: 'public' },
      response: liveSchema,
      handler: () => Promise.resolve({ status: 'live' as const, version }),
    }),
    route({
      method: 'GET',
      path: '/health/ready',
      summary: 'Whether the server can do its work: database reachable, schema of the right version',
      policy: { scope: 'public' },
      response: readySchema,
      handler: async () => {
        const obstacles = await findObstacles();
        if (obstacles.length > 0) throw unavailable(obstacles.join('; '), { obstacles });
        return { status: 'ready' as const };
      },
    }),
  ];
}
