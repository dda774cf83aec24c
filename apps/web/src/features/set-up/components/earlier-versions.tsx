import type { Characteristic, SpecificationVersionView } from '@app/contracts';
import { When } from '../../../shared/ui/when';
import { appliesWords, limitsWords } from '../specification-words';

interface EarlierVersionsProps {
  characteristic: Characteristic;
  upcoming: readonly SpecificationVersionView[];
  earlier: readonly SpecificationVersionView[];
}

/** Versions that are not in force: those to come stand open, earlier ones fold away. */
export function EarlierVersions({ characteristic, upcoming, earlier }: EarlierVersionsProps) {
  return (
    <>
      {upcoming.map((version) => (
        <p key={version.id} className="versions__one">
          <VersionWords version={version} characteristic={characteristic} />
        </p>
      ))}
      {earlier.length > 0 && (
        <details className="versions">
          <summary>
            {earlier.length === 1 ? 'One earlier version' : `${earlier.length} earlier versions`} of{' '}
            {characteristic.name}
          </summary>
          {earlier.map((version) => (
            <p key={version.id} className="versions__one soft">
              <VersionWords version={version} characteristic={characteristic} />
            </p>
          ))}
        </details>
      )}
    </>
  );
}

function VersionWords({
  version,
  characteristic,
}: {
  version: SpecificationVersionView;
  characteristic: Characteristic;
}) {
  return (
    <>
      Version {version.version}, from <When at={version.validFrom} form="full" />
      {version.until !== null && (
        <>
          {' '}
          until <When at={version.until} form="full" />
        </>
      )}
      : {limitsWords(version, characteristic)}, {appliesWords(version)}. Proposed by {version.proposedBy}, approved by{' '}
      {version.approvedBy}.
    </>
  );
}
