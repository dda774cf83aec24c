import type { ChannelView } from '@app/contracts';
import type { ChannelRow } from '@app/data';

export function toChannelView(row: ChannelRow): ChannelView {
  return {
    id: row.id,
    name: row.name,
    lineId: row.lineId,
    lineName: row.lineName,
    plantId: row.plantId,
    characteristic: { name: row.characteristicName, unit: row.unit, resolution: row.resolution },
    gauge:
      row.gaugeId === null
        ? null
        : { id: row.gaugeId, assetNumber: row.gaugeAssetNumber!, kind: row.gaugeKind!, position: row.position },
    planInForce:
      row.planId === null
        ? null
        : { id: row.planId, revision: row.planRevision!, since: row.planApprovedAt!.toISOString() },
    planPending:
      row.pendingId === null ? null : { id: row.pendingId, revision: row.pendingRevision!, state: row.pendingState! },
    retiredSince: row.retiredAt && row.retiredAt.toISOString(),
  };
}
