import { Buffer } from 'node:buffer';
import { spawn } from 'node:child_process';
import process from 'node:process';

/**
 * A tool's script, run by this Node.
 *
 * @typedef {{ label: string, script: string, args: string[] }} Task
 */

/** @type {Set<import('node:child_process').ChildProcess>} */
const running = new Set();

/** The exit status that a signal asked for, once one has come. */
let stopStatus = 0;

function leaveIfStopped() {
  if (stopStatus !== 0 && running.size === 0) process.exit(stopStatus);
}

/** Signals are taken over only while tasks run: before and after them they belong to the command. */
const handlers = /** @type {const} */ ([
  ['SIGINT', 130],
  ['SIGTERM', 143],
]).map(([signal, status]) => ({
  signal,
  handle: () => {
    stopStatus = status;
    for (const child of running) child.kill(signal);
    leaveIfStopped();
  },
}));

/** @param {import('node:child_process').ChildProcess} child */
function add(child) {
  if (running.size === 0) for (const { signal, handle } of handlers) process.on(signal, handle);
  running.add(child);
}

/** @param {import('node:child_process').ChildProcess} child */
function remove(child) {
  running.delete(child);
  if (running.size === 0) for (const { signal, handle } of handlers) process.off(signal, handle);
  leaveIfStopped();
}

/**
 * @param {string} root
 * @param {Task} task
 * @param {import('node:child_process').StdioOptions} stdio
 * @param {(chunk: Buffer) => void} [onOutput]
 * @returns {Promise<number>} exit status
 */
function run(root, task, stdio, onOutput) {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, [task.script, ...task.args], { cwd: root, stdio });
    add(child);
    if (onOutput !== undefined) {
      child.stdout?.on('data', onOutput);
      child.stderr?.on('data', onOutput);
    }
    child.on('error', reject);
    child.on('close', (status) => {
      remove(child);
      resolve(status ?? 1);
    });
  });
}

/**
 * Runs a task with its output shown as it comes.
 *
 * @param {string} root
 * @param {Task} task
 * @returns {Promise<number>} exit status
 */
export function runShown(root, task) {
  return run(root, task, ['ignore', 'inherit', 'inherit']);
}

/**
 * The same on standard error, where standard output belongs to the command that follows.
 *
 * @param {string} root
 * @param {Task} task
 * @returns {Promise<number>} exit status
 */
export function runAside(root, task) {
  return run(root, task, ['ignore', 2, 2]);
}

/**
 * Runs tasks side by side; each one's output is shown in one piece when it ends.
 *
 * @param {string} root
 * @param {Task[]} tasks
 * @returns {Promise<number>} how many failed
 */
export async function runTogether(root, tasks) {
  const statuses = await Promise.all(
    tasks.map(async (task) => {
      const started = Date.now();
      /** @type {Buffer[]} */
      const output = [];
      const status = await run(root, task, ['ignore', 'pipe', 'pipe'], (chunk) => output.push(chunk));
      const seconds = ((Date.now() - started) / 1000).toFixed(1);
      process.stdout.write(`${status === 0 ? 'ok    ' : 'FAILED'}  ${task.label}  ${seconds} s\n`);
      process.stdout.write(Buffer.concat(output));
      return status;
    }),
  );
  return statuses.filter((status) => status !== 0).length;
}
