/**
 * Runs beside a command and ends what the command has started if the command itself is killed: it reads its orders from a
 * pipe, a JSON object a line, and acts when the pipe closes. It is a program of its own, so that `kill -9` leaves it alive.
 *   {"add": {"pid": 12, "isGroup": true, "signal": "SIGTERM", "graceSeconds": 10, "force": "SIGKILL"}}
 *   {"remove": 12}   {"removeFolder": "/tmp/x"}
 */
import { rmSync } from 'node:fs';
import { createInterface } from 'node:readline';
import { isAlive, isGroupAlive, signal, startMark, waitUntil } from './processes.mjs';

const programs = new Map();
const folders = [];

function take(order) {
  if (order.add) programs.set(order.add.pid, { ...order.add, mark: startMark(order.add.pid) });
  if (order.remove) programs.delete(order.remove);
  if (order.removeFolder) folders.push(order.removeFolder);
}

async function end({ pid, isGroup, signal: name, graceSeconds, force, mark }) {
  if (startMark(pid) !== mark) return;
  const target = isGroup ? -pid : pid;
  if (!signal(target, name)) return;
  const hasEnded = await waitUntil(() => !(isGroup ? isGroupAlive(pid) : isAlive(pid)), graceSeconds);
  if (!hasEnded) signal(target, force);
}

for (const name of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(name, () => {});

for await (const line of createInterface({ input: process.stdin })) take(JSON.parse(line));
for (const program of [...programs.values()].reverse()) await end(program);
for (const folder of folders) rmSync(folder, { recursive: true, force: true, maxRetries: 10, retryDelay: 200 });
