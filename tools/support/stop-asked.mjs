/**
 * Resolves with `{signal}` when somebody asks us to stop: Ctrl-C, a signal, the end of the terminal, or the end of the npm
 * that has started us. Asked a second time, `hurry` is called.
 */
export function stopAsked(hurry) {
  return new Promise((resolve) => {
    let asked = 0;
    const hear = (signal) => {
      asked += 1;
      resolve({ signal });
      if (asked === 2) void hurry();
    };
    for (const name of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(name, () => hear(name));
    if (!process.env.npm_lifecycle_event) return;
    const parent = process.ppid;
    const watch = setInterval(() => {
      if (process.ppid === parent) return;
      clearInterval(watch);
      hear('the end of npm');
    }, 500);
    watch.unref();
  });
}
