import { useEffect, type ReactNode } from 'react';

interface PageHeadingProps {
  /** Plain text: it is the document's title too. */
  title: string;
  /** Stands before the title, such as a lot's mark. */
  before?: ReactNode;
  /** One or two sentences below the title. */
  lead?: ReactNode;
  tools?: ReactNode;
}

export function PageHeading({ title, before, lead, tools }: PageHeadingProps) {
  useDocumentTitle(title);
  return (
    <header className="page-heading">
      <div className="page-heading__row">
        <h1 className="page-heading__title">
          {before}
          {title}
        </h1>
        {tools !== undefined && <div className="page-heading__tools">{tools}</div>}
      </div>
      {lead !== undefined && <div className="page-heading__lead">{lead}</div>}
    </header>
  );
}

export function useDocumentTitle(title: string): void {
  useEffect(() => {
    document.title = `${title} · Ebbline`;
  }, [title]);
}
