import type { LotMark, VerdictView } from '@app/contracts';
import { MarkPaths } from '../../../shared/ui/mark';
import { lieScale } from '../lie-scale';

const WIDTH = 260;
const HEIGHT = 34;
const MIDDLE = 15;
const AIR = 12;

/** The lot mean among its baseline, control limits and specification limits. The row above says the same in figures. */
export function WhereItLies({ verdict, mark }: { verdict: VerdictView; mark: LotMark }) {
  const scale = lieScale(verdict, WIDTH, AIR);
  if (scale === null || verdict.lotMean === null) return <div className="lies" />;
  const { controlLow, controlHigh, baseline, constant } = verdict;
  return (
    <svg className="lies" viewBox={`0 0 ${WIDTH} ${HEIGHT}`} width={WIDTH} height={HEIGHT} aria-hidden="true">
      <line className="lies__axis" x1={0} x2={WIDTH} y1={MIDDLE} y2={MIDDLE} />
      {controlLow !== null && controlHigh !== null && (
        <rect
          className="lies__band"
          x={scale(controlLow)}
          width={scale(controlHigh) - scale(controlLow)}
          y={MIDDLE - 8}
          height={16}
        />
      )}
      {baseline !== null && (
        <line className="lies__baseline" x1={scale(baseline)} x2={scale(baseline)} y1={MIDDLE - 10} y2={MIDDLE + 10} />
      )}
      <Bracket at={verdict.lowerSpecification} side={1} scale={scale} />
      <Bracket at={verdict.upperSpecification} side={-1} scale={scale} />
      {constant.low !== null && constant.high !== null && (
        <path
          className="lies__constant"
          d={`M${scale(constant.low)},28v4M${scale(constant.low)},30H${scale(constant.high)}m0,-2v4`}
        />
      )}
      <g transform={`translate(${scale(verdict.lotMean)} ${MIDDLE})`}>
        <MarkPaths mark={mark} />
      </g>
    </svg>
  );
}

/** A specification limit, its feet pointing inside. */
function Bracket({ at, side, scale }: { at: number | null; side: 1 | -1; scale: (value: number) => number }) {
  if (at === null) return null;
  const foot = 4 * side;
  return <path className="lies__specification" d={`M${scale(at) + foot},${MIDDLE - 11}h${-foot}v22h${foot}`} />;
}
