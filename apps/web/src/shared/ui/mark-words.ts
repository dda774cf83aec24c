import type { ControlState, Disposition, LotMark, SpecificationState } from '@app/contracts';

export const CONTROL_WORDS: Record<ControlState, string> = {
  within_control_limits: 'within control limits',
  outside_control_limits: 'outside control limits',
  not_scored: 'not scored',
};

export const SPECIFICATION_WORDS: Record<SpecificationState, string> = {
  inside_specification: 'inside specification',
  inside_within_guard_band: 'inside specification, within the guard band',
  outside_specification: 'outside specification',
  no_specification: 'no specification',
};

export const FATE_WORDS: Record<Disposition, string> = {
  release: 'released',
  scrap: 'scrapped',
  rework: 'sent to rework',
  concession: 'released under concession',
  regrade: 'regraded',
};

/** The verdict alone: "outside control limits, provisional; outside specification". */
export function verdictWords(mark: LotMark): string {
  const control = CONTROL_WORDS[mark.controlState];
  const isProvisional = mark.isProvisional && mark.controlState !== 'not_scored';
  const verdict = isProvisional ? `${control}, provisional` : control;
  const tellsSpecification =
    mark.specificationState === 'outside_specification' || mark.specificationState === 'inside_within_guard_band';
  return tellsSpecification ? `${verdict}; ${SPECIFICATION_WORDS[mark.specificationState]}` : verdict;
}

/** What became of the lot: "held", "released", or nothing. */
export function fateWords(mark: LotMark): string | null {
  if (mark.holdState === 'open') return 'held';
  return mark.disposition === null ? null : FATE_WORDS[mark.disposition];
}

/** The whole mark in words, for a label beside or instead of it. */
export function markWords(mark: LotMark): string {
  const fate = fateWords(mark);
  const parts = fate === null ? [] : [fate];
  parts.push(verdictWords(mark));
  if (mark.hasNotice) parts.push('with a notice');
  if (mark.isExcluded) parts.push('excluded');
  return parts.join('; ');
}
