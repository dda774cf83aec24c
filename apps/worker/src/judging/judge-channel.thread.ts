import { createHash } from 'node:crypto';
import {
  type ChannelInputs,
  createDatabase,
  type Database,
  getChannelInputs,
  type JudgedChannel,
  type SegmentInputs,
} from '@app/data';
import { judgeSegment } from '@app/scoring';

export interface JudgeChannelTask {
  databaseUrl: string;
  channelId: number;
  /** Epoch seconds, or null: settled lots stay settled. */
  rejudgeFrom: number | null;
}

/** Lives as long as the thread. */
let database: Database | undefined;

export default async function judgeChannel(task: JudgeChannelTask): Promise<JudgedChannel> {
  database ??= createDatabase(task.databaseUrl, { min: 0, max: 1 });
  return judgeFrom(database, task);
}

/** Reads a channel's inputs in one snapshot and judges its segments. Writes nothing. */
export async function judgeFrom(
  db: Database,
  { channelId, rejudgeFrom }: Pick<JudgeChannelTask, 'channelId' | 'rejudgeFrom'>,
): Promise<JudgedChannel> {
  const inputs = await db.transaction((tx) => getChannelInputs(tx, channelId, rejudgeFrom), {
    isolationLevel: 'repeatable read',
    readOnly: true,
  });
  return judge(inputs);
}

function judge(inputs: ChannelInputs): JudgedChannel {
  const { plan } = inputs;
  return {
    channelId: inputs.channelId,
    plantId: inputs.plantId,
    inputsVersion: inputs.inputsVersion,
    plan: plan && { id: plan.id, approvedAt: plan.approvedAt, isFirst: plan.isFirst, limit: plan.parameters.limit },
    segments: inputs.segments.map((segment) => ({
      startsAt: segment.startsAt,
      endsAt: segment.endsAt,
      drawFrom: Math.min(
        ...segment.lots.filter((lot) => segment.lotIdsToJudge.includes(lot.lotId)).map((lot) => lot.firstAt),
      ),
      inputHash: hashOf(plan?.id ?? null, segment),
      judgement: judgeSegment({
        plan: plan?.parameters ?? null,
        lots: segment.lots,
        lotIdsToJudge: segment.lotIdsToJudge,
        segmentStartsAt: segment.startsAt ?? segment.lots[0].firstAt,
        segmentEndsAt: segment.endsAt,
        startLevel: segment.startLevel,
      }),
    })),
  };
}

/** SHA-256 of what went into the judging, so that it can be shown later that the same inputs give the same verdicts. */
function hashOf(planId: number | null, segment: SegmentInputs): Buffer {
  return createHash('sha256').update(JSON.stringify({ planId, segment })).digest();
}
