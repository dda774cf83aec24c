import { within } from './within';

describe('waiting within a time', () => {
  it('says whether the work was done in time', async () => {
    expect(await within(1000, Promise.resolve('done'))).toBe(true);
    expect(await within(10, new Promise(() => {}))).toBe(false);
  });

  it('throws what fails in time, and lets go what fails later', async () => {
    await expect(within(1000, Promise.reject(new Error('no')))).rejects.toThrow('no');
    let fail: (error: Error) => void = () => {};
    const late = new Promise((_resolve, reject) => {
      fail = reject;
    });
    expect(await within(5, late)).toBe(false);
    fail(new Error('nobody hears this'));
  });
});
