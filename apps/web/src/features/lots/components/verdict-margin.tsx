import type { VerdictView } from '@app/contracts';
import { disagreementWords } from '../verdict-words';

/** What the figures mean, and what removing the slow movement changed. */
export function VerdictMargin({ verdicts }: { verdicts: VerdictView[] }) {
  const disagreement = disagreementWords(verdicts);
  return (
    <>
      {disagreement !== null && (
        <p>
          <strong>{disagreement}</strong>
        </p>
      )}
      <p>
        The score is the lot mean minus the baseline fitted without this lot, in units of its own standard deviation
        (σ). A provisional verdict settles when later readings arrive.
      </p>
      <p>
        In each drawing the ochre band lies between the control limits, its rule is the baseline, the brackets are the
        specification limits. The grey rule below: control limits of the constant baseline.
      </p>
    </>
  );
}
