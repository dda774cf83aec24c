import { useId, useState, type DragEvent } from 'react';
import { useNavigate } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { ProblemNotice } from '../../../shared/ui/problem-notice';
import { ApiProblem } from '../../../shared/api/client';
import { LARGEST_FILE_BYTES, uploadWorkbook } from '../api/upload';

interface DropZoneProps {
  lineId: number;
  lineName: string;
}

/** Drop a workbook here or choose one; it is sent at once and read, and nothing is scored before it is confirmed. */
export function DropZone({ lineId, lineName }: DropZoneProps) {
  const inputId = useId();
  const navigate = useNavigate();
  const [isOver, setIsOver] = useState(false);
  const [sending, setSending] = useState<{ name: string; share: number } | null>(null);
  const [problem, setProblem] = useState<unknown>(null);

  const take = async (file: File | undefined) => {
    if (file === undefined || sending !== null) return;
    setProblem(null);
    if (file.size > LARGEST_FILE_BYTES) {
      setProblem(tooLarge(file));
      return;
    }
    setSending({ name: file.name, share: 0 });
    try {
      const intake = await uploadWorkbook(lineId, file, (share) => setSending({ name: file.name, share }));
      void navigate(urls.intake(intake.id));
    } catch (error) {
      setProblem(error);
      setSending(null);
    }
  };
  const drag = {
    onDragOver: (event: DragEvent) => {
      event.preventDefault();
      setIsOver(true);
    },
    onDragLeave: () => setIsOver(false),
    onDrop: (event: DragEvent) => {
      event.preventDefault();
      setIsOver(false);
      void take(event.dataTransfer.files[0]);
    },
  };

  return (
    <div className="drop-zone-frame">
      <div className={`drop-zone${isOver ? ' drop-zone--over' : ''}`} {...drag}>
        <input
          id={inputId}
          className="visually-hidden drop-zone__input"
          type="file"
          accept=".xlsx,.xlsm,.csv,.txt,.tsv,application/vnd.openxmlformats-officedocument.spreadsheetml.sheet,text/csv,text/plain"
          disabled={sending !== null}
          onChange={(event) => {
            const file = event.currentTarget.files?.[0];
            void take(file);
            event.currentTarget.value = '';
          }}
        />
        {sending === null ? (
          <label htmlFor={inputId} className="drop-zone__label">
            <span>
              Drop a workbook of {lineName} here, or <span className="drop-zone__choose">choose a file</span>.
            </span>
            <span className="soft">
              Excel (.xlsx, .xlsm) or text (.csv, .txt), as your plant writes it, up to 30 MB.
            </span>
          </label>
        ) : (
          <Sending name={sending.name} share={sending.share} />
        )}
      </div>
      {problem !== null && <ProblemNotice problem={problem} what="The workbook was not taken in." />}
    </div>
  );
}

function Sending({ name, share }: { name: string; share: number }) {
  const percent = Math.round(share * 100);
  return (
    <p className="drop-zone__label" role="status">
      <span>
        {name}: {percent < 100 ? `${percent} % sent` : 'sent; the server is storing it'}
      </span>
      <progress value={share} aria-label={`Sending ${name}`} />
    </p>
  );
}

const tooLarge = (file: File) =>
  new ApiProblem({
    status: 413,
    code: 'file-too-large',
    detail: `${file.name} is larger than 30 MB. Split it by shift and upload the parts.`,
  });
