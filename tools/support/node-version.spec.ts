const { isInRange } = jest.requireActual<{ isInRange: (version: string, range: string) => boolean }>(
  './node-version.mjs',
);

const RANGE = '>=20.19 <21 || >=22.12';

describe('isInRange', () => {
  it.each(['20.19.0', '20.20.2', '22.12.0', '22.13.1', '24.0.0'])('accepts Node %s', (version) => {
    expect(isInRange(version, RANGE)).toBe(true);
  });

  it.each(['18.20.0', '20.9.0', '20.18.9', '21.0.0', '22.2.0', '22.11.9'])('turns Node %s down', (version) => {
    expect(isInRange(version, RANGE)).toBe(false);
  });

  it('throws on a range that it cannot read', () => {
    expect(() => isInRange('20.19.0', '^20')).toThrow('Cannot read the Node range');
  });
});
