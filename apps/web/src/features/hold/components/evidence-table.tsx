import { decimalsOf, formatNumber, type VerdictView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { limitsText, scoreText } from '../../../shared/record/record-words';
import { FoldingTable, type FoldingColumn } from '../../../shared/ui/folding-table';
import { Mark } from '../../../shared/ui/mark';
import { markOf, verdictText } from './hold-words';

const decimals = (verdict: VerdictView) => decimalsOf(verdict.channel.characteristic.resolution) + 1;
const number = (value: number | null, verdict: VerdictView) =>
  value === null ? '–' : formatNumber(value, decimals(verdict));

const COLUMNS: FoldingColumn<VerdictView>[] = [
  {
    name: 'Channel',
    isLead: true,
    cell: (verdict) => (
      <>
        <Mark mark={markOf(verdict)} isSilent />{' '}
        <Link to={urls.channel(verdict.channel.id)}>{verdict.channel.name}</Link>
        <span className="evidence-unit">, {verdict.channel.characteristic.unit}</span>
      </>
    ),
  },
  { name: 'Gauge', cell: (verdict) => verdict.channel.gaugeAssetNumber },
  { name: 'Readings', isNumber: true, cell: (verdict) => verdict.readingCount },
  { name: 'Lot mean', isNumber: true, cell: (verdict) => number(verdict.lotMean, verdict) },
  { name: 'Baseline', isNumber: true, cell: (verdict) => number(verdict.baseline, verdict) },
  {
    name: 'Control limits',
    isNumber: true,
    cell: (verdict) => limitsText(verdict.controlLow, verdict.controlHigh, decimals(verdict)) ?? '–',
  },
  {
    name: 'Specification limits',
    isNumber: true,
    cell: (verdict) =>
      limitsText(verdict.lowerSpecification, verdict.upperSpecification, decimals(verdict) - 1) ?? 'none',
  },
  { name: 'Score', isNumber: true, cell: (verdict) => scoreText(verdict.score) },
  { name: 'Verdict', cell: verdictText },
];

/** Every channel of the lot with its figures, enough for a calculation by hand. */
export function EvidenceTable({ verdicts, lotNumber }: { verdicts: readonly VerdictView[]; lotNumber: string }) {
  return (
    <FoldingTable
      caption={`Verdicts of lot ${lotNumber} by channel`}
      columns={COLUMNS}
      items={verdicts}
      keyOf={(verdict) => verdict.id}
    />
  );
}
