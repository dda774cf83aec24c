import type { SpecificationSetUpView } from '@app/contracts';
import type { FoldingColumn } from '../../../shared/ui/folding-table';
import { When } from '../../../shared/ui/when';
import { appliesWords, sortVersions, statedValue } from '../specification-words';

/** What is in force at an instant, a row a characteristic. */
export function columnsAt(now: number): FoldingColumn<SpecificationSetUpView>[] {
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
