import type { DeskGroup } from '@app/contracts';

const EXPLANATIONS: Record<DeskGroup, string> = {
  decide:
    'A held lot may not move on until somebody with the authority decides it. Nobody decides a hold from an intake which they confirmed.',
  fix: 'A workbook was read, and something in it wants your eye before it is confirmed.',
  approve:
    'A plan says how a channel is judged, a specification what a product must keep to. Nobody approves what they proposed.',
  check: 'A gauge whose check is due: measure its check standard and record what it shows.',
  set_aside: 'Put the lot apart, then say so here. The hold itself is only a notice.',
};

/** What the words on the desk mean, of those that stand there now. */
export function DeskMargin({ groups }: { groups: DeskGroup[] }) {
  return (
    <>
      {groups.map((group) => (
        <p key={group}>{EXPLANATIONS[group]}</p>
      ))}
    </>
  );
}
