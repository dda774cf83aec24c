import { formatMean, formatValue } from '@app/contracts';

interface MeasureProps {
  value: number | null;
  characteristic: { unit: string; resolution: number };
  /** A mean shows one decimal more than a reading. */
  isMean?: boolean;
  /** In place of a value that is not there. */
  none?: string;
}

/** A value in the characteristic's own resolution and unit. */
export function Measure({ value, characteristic, isMean = false, none = '–' }: MeasureProps) {
  if (value === null) return <span className="measure measure--none">{none}</span>;
  const text = isMean ? formatMean(value, characteristic) : formatValue(value, characteristic);
  return <span className="measure">{text}</span>;
}
