import { parseArgs } from 'node:util';
import { DEMO_SEED, writeNewcomerWorkbooks } from '../demo/world';

const HELP = `Writes the two shift workbooks that a newcomer uploads by hand, one in long and one in wide layout.

  node dist/tools/demo-workbooks.js --ends-at 2026-03-02T06:00Z --into fixtures/workbooks

  --ends-at   end of the demo's six weeks, ISO 8601; a shift change at Marrowby Works. The workbooks hold the two shifts after it
  --into      folder to write to; made when missing
  --seed      integer, default ${DEMO_SEED}
`;

async function main(): Promise<void> {
  const { values } = parseArgs({
    options: {
      'ends-at': { type: 'string' },
      into: { type: 'string' },
      seed: { type: 'string', default: String(DEMO_SEED) },
      help: { type: 'boolean', default: false },
    },
  });
  const endsAt = Date.parse(values['ends-at'] ?? '') / 1000;
  if (values.help || !values.into || !Number.isFinite(endsAt)) {
    process.stdout.write(HELP);
    process.exitCode = values.help ? 0 : 2;
    return;
  }
  for (const { path } of await writeNewcomerWorkbooks(values.into, Number(values.seed), endsAt)) {
    process.stdout.write(`${path}\n`);
  }
}

void main();
