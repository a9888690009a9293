import { Client } from 'pg';
import { describe, expect, it } from 'vitest';
import { useApi } from '../support/test-api';

const api = useApi();

describe('health', () => {
  it('tells that the server is alive', async () => {
    expect(await api().anybody.get('/api/health')).toMatchObject({ status: 200, body: { status: 'live' } });
  });

  it('tells that the server can work', async () => {
    expect(await api().anybody.get('/api/health/ready')).toMatchObject({
      status: 200,
      body: { status: 'ready' },
    });
  });

  it('tells that the database is of another version', async () => {
    const owner = new Client({ connectionString: api().testDatabase.ownerUrl });
    await owner.connect();
    const change = (hash: string, to: string) =>
      owner.query('update drizzle.__drizzle_migrations set hash = $2 where hash = $1', [hash, to]);
    try {
      const { rows } = await owner.query<{ hash: string }>(
        'select hash from drizzle.__drizzle_migrations order by created_at limit 1',
      );
      await change(rows[0].hash, 'of another program');
      const answer = await api().anybody.get('/api/health/ready');
      expect([answer.status, answer.body]).toMatchObject([503, { code: 'unavailable' }]);
      await change('of another program', rows[0].hash);
    } finally {
      await owner.end();
    }
  });

  it('tells that the database cannot be reached, and stays alive', async () => {
    await api().testDatabase.drop();
    const answer = await api().anybody.get('/api/health/ready');
    expect([answer.status, answer.body]).toMatchObject([
      503,
      { obstacles: ['the database cannot be reached'] },
    ]);
    expect((await api().anybody.get('/api/health')).status).toBe(200);
  });
});
