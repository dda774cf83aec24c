import type { SpecificationSetUpView } from '@app/contracts';
import type { Send } from '../api/use-send';
import { EndQuestion } from './end-question';
import { InlineForm, type FieldSpec } from './inline-form';
import type { RowAction } from './row-table';

const PASSWORD: FieldSpec<{ password: string }>[] = [
  {
    name: 'password',
    label: 'Your password again',
    kind: 'password',
    missing: 'Your password stands for your signature.',
  },
];

const whatOf = ({ product, characteristic }: SpecificationSetUpView) => `${characteristic.name} on ${product.code}`;

/** Signing a proposed version, for who may. */
export function approving(send: Send, specification: SpecificationSetUpView): RowAction[] {
  const { proposal } = specification;
  if (proposal === null || !proposal.mayApprove) return [];
  const next = (specification.versions.at(0)?.version ?? 0) + 1;
  return [
    {
      words: 'Approve',
      label: `Approve ${whatOf(specification)}`,
      panel: (onDone) => (
        <div className="rows__sign">
          <InlineForm
            fields={PASSWORD}
            values={{ password: '' }}
            note={`Version ${next} is compared with every lot that begins from its start on; lots that began since are judged again. Your name stands beside it: “approved”.`}
            sends={`Approve version ${next}`}
            onLeave={onDone}
            send={async (body) => {
              await send('POST', `/specification-proposals/${proposal.id}/approval`, body);
              onDone();
            }}
          />
        </div>
      ),
    },
  ];
}

export function withdrawing(send: Send, specification: SpecificationSetUpView): RowAction[] {
  const { proposal } = specification;
  if (proposal === null || !proposal.mayWithdraw) return [];
  return [
    {
      words: 'Withdraw',
      label: `Withdraw the proposal of ${whatOf(specification)}`,
      panel: (onDone) => (
        <EndQuestion
          sentence={`The proposal of ${whatOf(specification)} ends, and stays in the audit. What is in force stays in force.`}
          words="Withdraw the proposal"
          onConfirm={() => send('POST', `/specification-proposals/${proposal.id}/withdrawal`)}
          onDone={onDone}
        />
      ),
    },
  ];
}
