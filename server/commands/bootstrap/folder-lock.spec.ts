import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { withFolderLock } from './folder-lock.mjs';

describe('withFolderLock', () => {
  let folder: string;
  let lock: string;
  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'tareline-lock-'));
    lock = join(folder, 'locks', 'work');
  });
  afterEach(() => rmSync(folder, { recursive: true }));

  it('holds the lock under its own process id while working and leaves nothing behind', async () => {
    const owners = await withFolderLock(lock, 'work', () => readdirSync(lock));
    expect(owners).toEqual([String(process.pid)]);
    expect(readdirSync(join(folder, 'locks'))).toEqual([]);
  });

  it('gives the lock back when the work fails', async () => {
    await expect(
      withFolderLock(lock, 'work', () => {
        throw new Error('broken work');
      }),
    ).rejects.toThrow('broken work');
    expect(existsSync(lock)).toBe(false);
  });

  it('takes over from a process that has ended', async () => {
    const { pid } = spawnSync(process.execPath, ['--version']);
    mkdirSync(lock, { recursive: true });
    writeFileSync(join(lock, String(pid)), '');
    expect(await withFolderLock(lock, 'work', () => readdirSync(lock))).toEqual([String(process.pid)]);
  });

  it('takes over an empty lock folder', async () => {
    mkdirSync(lock, { recursive: true });
    expect(await withFolderLock(lock, 'work', () => 'done')).toBe('done');
  });

  it('waits for a living owner', async () => {
    const livingOwner = join(lock, String(process.ppid));
    mkdirSync(lock, { recursive: true });
    writeFileSync(livingOwner, '');
    const order: string[] = [];
    const waiting = withFolderLock(lock, 'work', () => order.push('worked'));
    order.push('owner leaves');
    rmSync(livingOwner);
    await waiting;
    expect(order).toEqual(['owner leaves', 'worked']);
  });
});
