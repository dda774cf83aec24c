import { useId, type ReactNode } from 'react';

interface SheetProps {
  title?: ReactNode;
  /** What explains the sheet; stands in the margin column, below the sheet on narrow screens. */
  margin?: ReactNode;
  /** A few controls at the right of the title. */
  tools?: ReactNode;
  /** `sign`: the one place where something is signed. `held`: about a lot that is held. */
  tone?: 'plain' | 'sign' | 'held';
  /** Charts and wide tables lie on the sheet edge to edge. */
  isFlush?: boolean;
  children: ReactNode;
}

export function Sheet({ title, margin, tools, tone = 'plain', isFlush = false, children }: SheetProps) {
  const titleId = useId();
  return (
    <div className="sheet-row">
      <section
        className={`sheet sheet--${tone}${isFlush ? ' sheet--flush' : ''}`}
        aria-labelledby={title === undefined ? undefined : titleId}
      >
        {(title !== undefined || tools !== undefined) && (
          <header className="sheet__head">
            {title !== undefined && (
              <h2 className="sheet__title" id={titleId}>
                {title}
              </h2>
            )}
            {tools !== undefined && <div className="sheet__tools">{tools}</div>}
          </header>
        )}
        <div className="sheet__body">{children}</div>
      </section>
      {margin !== undefined && <aside className="sheet-margin">{margin}</aside>}
    </div>
  );
}
