import type { ReactNode } from 'react';

/** One sentence that says what would be here and how it comes. */
export function EmptyNote({ children }: { children: ReactNode }) {
  return <p className="empty-note">{children}</p>;
}
