import { useId } from 'react';
import type { ProductSetUpView, SpecificationSetUpView } from '@app/contracts';
import { useSession } from '../../../shared/session/session';
import { useNow } from '../../../shared/time/use-now';
import type { FoldingColumn } from '../../../shared/ui/folding-table';
import { Loaded } from '../../../shared/ui/loaded';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Sheet } from '../../../shared/ui/sheet';
import { When } from '../../../shared/ui/when';
import { useCharacteristics, useProducts, useSpecifications } from '../api/set-up';
import { appliesWords, sortVersions, statedValue } from '../specification-words';
import { EarlierVersions } from './earlier-versions';
import { ProposalForm } from './proposal-form';
import { approving, withdrawing } from './proposal-actions';
import { ProposalNote } from './proposal-note';
import { RowTable, type RowAction } from './row-table';
import { useSend } from '../api/use-send';

/** A table a product: what is in force, what was, and what waits for a second person. */
export function SpecificationSection({ plantId }: { plantId: number }) {
  const products = useProducts(plantId);
  const specifications = useSpecifications(plantId);
  return (
    <Loaded
      query={products}
      failure="The products could not be loaded."
      isEmpty={(found) => found.every(({ isRetired }) => isRetired)}
      empty={
        <Sheet title="Specifications">
          <EmptyNote>
            No product yet, so there is nothing to specify. An administrator adds products and characteristics first.
          </EmptyNote>
        </Sheet>
      }
    >
      {(found) => (
        <Sheet title="Specifications" isFlush margin={<SpecificationMargin />}>
          <Loaded query={specifications} failure="The specifications could not be loaded.">
            {(all) =>
              found
                .filter(({ isRetired }) => !isRetired)
                .map((product) => (
                  <ProductSpecifications
                    key={product.id}
                    plantId={plantId}
                    product={product}
                    specifications={all.filter((one) => one.product.id === product.id)}
                  />
                ))
            }
          </Loaded>
        </Sheet>
      )}
    </Loaded>
  );
}

interface ProductSpecificationsProps {
  plantId: number;
  product: ProductSetUpView;
  specifications: SpecificationSetUpView[];
}

function ProductSpecifications({ plantId, product, specifications }: ProductSpecificationsProps) {
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

function columnsAt(now: number): FoldingColumn<SpecificationSetUpView>[] {
  const inForce = ({ versions }: SpecificationSetUpView) => sortVersions(versions, now).inForce;
  const value = (one: SpecificationSetUpView, name: 'nominal' | 'lower' | 'upper') => {
    const version = inForce(one);
    const number = version?.[name] ?? null;
    return number === null ? (version === null ? '–' : 'none') : statedValue(number, one.characteristic);
  };
  return [
    { name: 'Characteristic', isLead: true, cell: ({ characteristic }) => characteristic.name },
    { name: 'Nominal value', isNumber: true, cell: (one) => value(one, 'nominal') },
    { name: 'Lower specification limit', isNumber: true, cell: (one) => value(one, 'lower') },
    { name: 'Upper specification limit', isNumber: true, cell: (one) => value(one, 'upper') },
    {
      name: 'Applies to',
      cell: (one) => {
        const version = inForce(one);
        return version === null ? '–' : appliesWords(version);
      },
    },
    {
      name: 'Version in force',
      cell: (one) => {
        const version = inForce(one);
        if (version === null) return 'none yet';
        return (
          <span title={`Proposed by ${version.proposedBy}, approved by ${version.approvedBy}`}>
            {version.version}, since <When at={version.validFrom} form="date" />
          </span>
        );
      },
    },
  ];
}

function SpecificationMargin() {
  return (
    <>
      <p>A new version is proposed by one person and approved by another. Versions are never changed.</p>
      <p>Baselines are fitted to the deviation from the nominal value, so that a change of product is no drift.</p>
    </>
  );
}
