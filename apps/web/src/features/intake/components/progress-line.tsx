import type { IntakeProgress, IntakeState } from '@app/contracts';
import { counted } from './intake-words';

interface ProgressLineProps {
  state: IntakeState;
  progress: IntakeProgress | null;
}

const WAITING: Partial<Record<IntakeState, string>> = {
  received: 'The workbook is stored and is being read.',
  queued: 'Confirmed; it waits its turn.',
  working: 'Its readings are being stored and judged.',
};

/** How far the server is, in numbers. */
export function ProgressLine({ state, progress }: ProgressLineProps) {
  const share =
    progress === null || progress.channelsTotal === 0 ? undefined : progress.channelsScored / progress.channelsTotal;
  return (
    <div className="progress-line" role="status" aria-live="polite">
      <p>{progress?.sentence ?? WAITING[state]}</p>
      <progress value={share} aria-label="Progress" />
      {progress !== null && (
        <p className="soft">
          {counted(progress.rowsRead, 'row')} read
          {progress.channelsTotal > 0 &&
            `, ${progress.channelsScored} of ${counted(progress.channelsTotal, 'channel')} scored`}
        </p>
      )}
    </div>
  );
}
