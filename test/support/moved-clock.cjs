/**
 * Preloaded into a program under test: its clock begins at TEST_CLOCK_AT (ms since 1970) and goes on from there; the number that the
 * parent process sends sets it anew. Timers keep their real lengths.
 */
const { isMainThread } = require('node:worker_threads');

const RealDate = Date;
let ahead = Number(process.env.TEST_CLOCK_AT) - RealDate.now();
const now = () => RealDate.now() + ahead;

globalThis.Date = new Proxy(RealDate, {
  construct: (target, values, made) => Reflect.construct(target, values.length === 0 ? [now()] : values, made),
  apply: () => new RealDate(now()).toString(),
  get: (target, key) => (key === 'now' ? now : Reflect.get(target, key)),
});

if (isMainThread && process.channel) {
  process.on('message', (at) => {
    ahead = at - RealDate.now();
  });
  process.channel.unref();
}
