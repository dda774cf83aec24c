import { Writable } from 'node:stream';
import { writeJson } from './write-json';

/** Takes its pieces slowly, a byte being enough to make the writer wait. */
class SlowOutput extends Writable {
  text = '';

  constructor() {
    super({ highWaterMark: 1, decodeStrings: false });
  }

  override _write(piece: string, _encoding: string, done: () => void): void {
    this.text += piece;
    setImmediate(done);
  }
}

describe('the writer of JSON', () => {
  it('writes keys in their order, all digits, null for what is not finite, in one line', async () => {
    const output = new SlowOutput();
    await writeJson(
      {
        name: 'a "b"',
        none: null,
        x: 0.1 + 0.2,
        t: Float64Array.of(1e-300, NaN, -0, 1772344800.25),
        lots: [{ lot: 'A', score: null }],
        warnings: [],
      },
      output,
    );
    expect(output.text).toBe(
      '{"name":"a \\"b\\"","none":null,"x":0.30000000000000004,"t":[1e-300,null,0,1772344800.25],"lots":[{"lot":"A","score":null}],"warnings":[]}\n',
    );
  });

  it('joins long arrays without a seam', async () => {
    const output = new SlowOutput();
    const values = Float64Array.from({ length: 20_000 }, (_, i) => i / 7);
    await writeJson({ values }, output);
    expect(JSON.parse(output.text)).toEqual({ values: [...values] });
  });
});
