import type { ReactNode } from 'react';
import './frame.css';
import { Header } from './header';
import { LineNavigation } from './line-navigation';
import { LineStrip } from './line-strip';

/** Header, line strip and navigation around each page. */
export function Frame({ children }: { children: ReactNode }) {
  return (
    <>
      <a className="skip-link" href="#page">
        Skip to the page
      </a>
      <Header />
      <LineStrip />
      <LineNavigation />
      <main className="page" id="page" tabIndex={-1}>
        {children}
      </main>
    </>
  );
}
