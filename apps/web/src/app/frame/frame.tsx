import type { ReactNode } from 'react';
import './frame.css';
import { ScrollRestoration } from 'react-router-dom';
import { useSession } from '../../shared/session/session';
import { Header } from './header';
import { LineNavigation } from './line-navigation';
import { LineStrip } from './line-strip';

/** Header, line strip and navigation around each page. */
export function Frame({ children }: { children: ReactNode }) {
  const { plant } = useSession();
  return (
    <>
      <a className="skip-link" href="#page">
        Skip to the page
      </a>
      <Header />
      <LineStrip />
      <LineNavigation />
      <ScrollRestoration />
      <main className="page" id="page" tabIndex={-1}>
        {children}
      </main>
      <footer className="foot">
        Times are those of {plant.name} ({plant.timeZone}).
      </footer>
    </>
  );
}
