/** Seconds since `startedAt` (milliseconds), for people: "4.2 s", "3 min 07 s". */
export function duration(startedAt, now = Date.now()) {
  const seconds = (now - startedAt) / 1000;
  if (seconds < 60) return `${seconds.toFixed(1)} s`;
  const whole = Math.round(seconds);
  return `${Math.floor(whole / 60)} min ${String(whole % 60).padStart(2, '0')} s`;
}

export function say(line = '') {
  process.stdout.write(`${line}\n`);
}

/** Says what is being done, does it, says how long that took. */
export async function step(title, work) {
  const startedAt = Date.now();
  say(`${title} …`);
  const result = await work();
  say(`  done in ${duration(startedAt)}`);
  return result;
}
