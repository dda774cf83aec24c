import { useId } from 'react';
import type { ProductSetUpView, SpecificationSetUpView } from '@app/contracts';
import { useSession } from '../../../shared/session/session';
import { useNow } from '../../../shared/time/use-now';
import { useCharacteristics } from '../api/set-up';
import { useSend } from '../api/use-send';
import { sortVersions } from '../specification-words';
import { EarlierVersions } from './earlier-versions';
import { approving, withdrawing } from './proposal-actions';
import { ProposalForm } from './proposal-form';
import { ProposalNote } from './proposal-note';
import { RowTable, type RowAction } from './row-table';
import { columnsAt } from './specification-columns';

interface ProductSpecificationsProps {
  plantId: number;
  product: ProductSetUpView;
  specifications: SpecificationSetUpView[];
}

/** The specifications of one product, with what may be done about each. */
export function ProductSpecifications({ plantId, product, specifications }: ProductSpecificationsProps) {
  const { can } = useSession();
  const send = useSend(plantId);
  const now = useNow();
  const titleId = useId();
  const characteristics = (useCharacteristics(plantId).data ?? []).filter(
    ({ id, isRetired }) => !isRetired && !specifications.some(({ characteristic }) => characteristic.id === id),
  );
  const mayPropose = can('propose_specification');
  const actionsOf = (one: SpecificationSetUpView): RowAction[] => {
    if (one.proposal !== null) return [...approving(send, one), ...withdrawing(send, one)];
    if (!mayPropose) return [];
    return [
      {
        words: 'Propose a new version',
        label: `Propose a new version of ${one.characteristic.name} on ${product.code}`,
        panel: (onDone) => (
          <ProposalForm
            plantId={plantId}
            product={product}
            characteristics={[one.characteristic]}
            before={one.versions.at(0) ?? null}
            onDone={onDone}
          />
        ),
      },
    ];
  };
  return (
    <section className="specifications" aria-labelledby={titleId}>
      <h3 id={titleId}>
        {product.code}, {product.name}
      </h3>
      <RowTable
        caption={`Specifications of ${product.code}`}
        columns={columnsAt(now)}
        items={specifications}
        keyOf={({ characteristic }) => characteristic.id}
        empty={`Nothing is specified of ${product.code} yet. A quality engineer proposes it, a quality manager approves it.`}
        actionsOf={actionsOf}
        below={(one) => below(one, now)}
        add={
          mayPropose && characteristics.length > 0
            ? {
                words: `Propose a specification of ${product.code}`,
                kind: 'plain',
                form: (onDone) => (
                  <ProposalForm
                    plantId={plantId}
                    product={product}
                    characteristics={characteristics}
                    before={null}
                    onDone={onDone}
                  />
                ),
              }
            : undefined
        }
      />
    </section>
  );
}

function below(one: SpecificationSetUpView, now: number) {
  const { upcoming, earlier } = sortVersions(one.versions, now);
  if (one.proposal === null && upcoming.length === 0 && earlier.length === 0) return null;
  return (
    <>
      {one.proposal !== null && <ProposalNote proposal={one.proposal} characteristic={one.characteristic} />}
      <EarlierVersions characteristic={one.characteristic} upcoming={upcoming} earlier={earlier} />
    </>
  );
}
