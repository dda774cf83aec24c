import { useId, useState, type DragEvent } from 'react';

/** Drop the set-up's workbook here or choose it; it is only looked at until it is applied. */
export function WorkbookDrop({ isDisabled, onFile }: { isDisabled: boolean; onFile: (file: File) => void }) {
  const inputId = useId();
  const [isOver, setIsOver] = useState(false);
  const take = (file: File | undefined) => {
    if (file !== undefined && !isDisabled) onFile(file);
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
      take(event.dataTransfer.files[0]);
    },
  };
  return (
    <div className={`set-up-drop${isOver ? ' set-up-drop--over' : ''}`} {...drag}>
      <input
        id={inputId}
        className="visually-hidden"
        type="file"
        accept=".xlsx,.xlsm,application/vnd.openxmlformats-officedocument.spreadsheetml.sheet"
        disabled={isDisabled}
        onChange={(event) => {
          take(event.currentTarget.files?.[0]);
          event.currentTarget.value = '';
        }}
      />
      <label htmlFor={inputId} className="set-up-drop__label">
        <span>
          Drop the set-up’s workbook here, or <span className="set-up-drop__choose">choose a file</span>.
        </span>
        <span className="soft">It shows what would change; nothing is changed before you apply it.</span>
      </label>
    </div>
  );
}
