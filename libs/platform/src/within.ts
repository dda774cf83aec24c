/** Waits for `work`, but no longer than told: true when it was done in time. What fails in time throws; what comes later is let go. */
export async function within(milliseconds: number, work: Promise<unknown>): Promise<boolean> {
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<false>((resolve) => {
    timer = setTimeout(() => resolve(false), milliseconds);
  });
  work.catch(() => undefined);
  try {
    return await Promise.race([work.then(() => true), late]);
  } finally {
    clearTimeout(timer);
  }
}
