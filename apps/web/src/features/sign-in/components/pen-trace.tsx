import type { LotMark } from '@app/contracts';
import { MarkPaths } from '../../../shared/ui/mark';
import { TRACE_HEIGHT, TRACE_WIDTH, traceLots, tracePath } from '../trace';

const WITHIN: LotMark = {
  controlState: 'within_control_limits',
  isProvisional: false,
  specificationState: 'inside_specification',
  hasNotice: false,
  holdState: null,
  disposition: null,
  isExcluded: false,
};
const HELD: LotMark = { ...WITHIN, controlState: 'outside_control_limits', holdState: 'open' };

/** A strip of chart paper: a slow movement, the lots along it, and one that does not fit. For the eye only. */
export function PenTrace() {
  return (
    <svg
      className="pen-trace"
      viewBox={`0 0 ${TRACE_WIDTH} ${TRACE_HEIGHT}`}
      preserveAspectRatio="xMidYMid slice"
      aria-hidden="true"
    >
      <path className="pen-trace__band" d={tracePath()} />
      <path className="pen-trace__baseline" d={tracePath()} />
      {traceLots().map((lot) => (
        <g key={lot.x} transform={`translate(${lot.x} ${lot.y})`}>
          <MarkPaths mark={lot.isHeld ? HELD : WITHIN} />
        </g>
      ))}
    </svg>
  );
}
