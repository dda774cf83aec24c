import {
  type DecisionView,
  type HoldListItem,
  holdReason,
  type HoldView,
  NO_GAUGE_CHECKS,
  permissionsOf,
  type Role,
} from '@app/contracts';
import type { HoldRow, SimilarHoldRow } from '@app/data';

export function toHoldListItem(row: HoldRow): HoldListItem {
  return {
    id: row.id,
    state: row.state,
    lot: { id: row.lotId, number: row.lotNumber },
    line: { id: row.lineId, name: row.lineName },
    product: row.product,
    openedAt: row.openedAt.toISOString(),
    isLate: row.isLate,
    reminders: row.reminders.map(({ audience, at }) => ({ audience, at: new Date(at).toISOString() })),
    causes: row.causes.map(({ channelId, channelName, signal, sentence }) => ({
      channel: { id: channelId, name: channelName },
      signal,
      sentence,
    })),
    isSetAside: row.setAsideAt !== null,
    decision: toDecisionView(row),
  };
}

function toDecisionView({ decision }: HoldRow): DecisionView | null {
  return decision && { ...decision, at: new Date(decision.at).toISOString() };
}

export interface HoldEvidence extends Pick<HoldView, 'mayDecide' | 'verdicts' | 'history'> {
  roles: Role[];
  similar: SimilarHoldRow[];
}

export function toHoldView(row: HoldRow, evidence: HoldEvidence): HoldView {
  const { roles, similar, mayDecide, verdicts, history } = evidence;
  return {
    ...toHoldListItem(row),
    plantId: row.plantId,
    quantity: row.quantity,
    quantityUnit: row.quantityUnit,
    lotStartsAt: row.lotStartsAt.toISOString(),
    lotEndsAt: row.lotEndsAt.toISOString(),
    reason: holdReason(
      row.lotNumber,
      row.causes.map((cause) => cause.sentence),
    ),
    verdicts,
    attribution: NO_GAUGE_CHECKS,
    similar: similar.map((other) => ({
      holdId: other.holdId,
      lotNumber: other.lotNumber,
      sentence: holdReason(other.lotNumber, [other.sentence]),
      disposition: other.disposition,
      decidedAt: other.decidedAt.toISOString(),
    })),
    setAside:
      row.setAsideAt === null
        ? null
        : { by: row.setAsideBy!, at: row.setAsideAt.toISOString(), place: row.setAsidePlace },
    evidenceVersion: row.evidenceVersion,
    mayDecide,
    maySetAside: row.state === 'open' && row.setAsideAt === null && permissionsOf(roles).includes('set_aside'),
    history,
  };
}
