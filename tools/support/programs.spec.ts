import { spawn, type ChildProcess } from 'node:child_process';
import { join } from 'node:path';
import { createInterface } from 'node:readline';

const { isAlive, waitUntil } = jest.requireActual<{
  isAlive: (pid: number) => boolean;
  waitUntil: (isDone: () => boolean, seconds: number) => Promise<boolean>;
}>('./processes.mjs');

/** A command that starts two programs through the list, prints their ids and its own state, and waits. */
const COMMAND = `
import { programList } from ${JSON.stringify(join(__dirname, 'programs.mjs'))};
const list = programList();
const sleeper = () => list.launch({ name: 'sleeper', command: 'sleep', args: ['300'], log: 'ignore' });
console.log([sleeper().pid, sleeper().pid].join(' '));
process.on('SIGTERM', () => list.stopAll().then(() => process.exit(0)));
setInterval(() => {}, 1000);
`;

async function startCommand(): Promise<{ command: ChildProcess; pids: number[] }> {
  const command = spawn(process.execPath, ['--input-type=module', '-e', COMMAND], {
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const [line] = await new Promise<string[]>((resolve) => {
    createInterface({ input: command.stdout }).once('line', (text) => resolve([text]));
  });
  return { command, pids: line.split(' ').map(Number) };
}

describe('programList', () => {
  it.each(['SIGTERM', 'SIGKILL'] as const)(
    'leaves no program behind when the command gets %s',
    async (signal) => {
      const { command, pids } = await startCommand();
      expect(pids.map(isAlive)).toEqual([true, true]);
      command.kill(signal);
      expect(await waitUntil(() => !pids.some(isAlive), 10)).toBe(true);
    },
    20_000,
  );
});
