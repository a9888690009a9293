import { describe, expect, it } from 'vitest';
import { createLog } from './log';

function logged(write: (log: ReturnType<typeof createLog>) => void): string {
  let text = '';
  write(createLog('info', { write: (line) => void (text += line) }));
  return text;
}

describe('createLog', () => {
  it.each([
    { password: 'sesame' },
    { person: { passwordHash: 'sesame' } },
    { request: { body: { newPassword: 'sesame' } } },
    { request: { headers: { cookie: 'sesame', authorization: 'sesame' } } },
    { headers: { 'set-cookie': ['sesame'] } },
    { token: 'sesame', tokenHash: 'sesame' },
  ])('keeps the secret of %j', (fields) => {
    const text = logged((log) => log.info(fields, 'something'));
    expect(text).not.toContain('sesame');
    expect(text).toContain('[secret]');
  });

  it('writes an error with its cause and code', () => {
    const cause = Object.assign(new Error('refused'), { code: 'ECONNREFUSED' });
    const text = logged((log) => log.error({ error: new Error('failed', { cause }) }));
    expect(JSON.parse(text)).toMatchObject({
      level: 'error',
      error: { message: 'failed', cause: { message: 'refused', code: 'ECONNREFUSED' } },
    });
  });

  it('leaves out what was sent with a statement that failed', () => {
    const failure = Object.assign(new Error('Failed query: insert\nparams: sesame'), {
      query: 'insert into people values ($1)',
      params: ['sesame'],
      cause: Object.assign(new Error('duplicate key'), { code: '23505' }),
    });
    const text = logged((log) => log.error({ error: failure }));
    expect(text).not.toContain('sesame');
    expect(JSON.parse(text)).toMatchObject({ error: { cause: { code: '23505', message: 'duplicate key' } } });
  });

  it('writes nothing below its level', () => {
    expect(logged((log) => log.debug('quiet'))).toBe('');
  });
});
