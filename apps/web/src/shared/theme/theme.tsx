import { createContext, useCallback, useContext, useEffect, useMemo, useState, type ReactNode } from 'react';

export type ThemeChoice = 'system' | 'light' | 'dark';
const STORAGE_KEY = 'ebbline.theme';

interface ThemeState {
  choice: ThemeChoice;
  /** What is shown now, whoever chose it. */
  shown: 'light' | 'dark';
  choose: (choice: ThemeChoice) => void;
}

const ThemeContext = createContext<ThemeState>({ choice: 'system', shown: 'light', choose: () => undefined });

/** Charts draw again when `shown` changes. */
export const useTheme = () => useContext(ThemeContext);

export function ThemeProvider({ children }: { children: ReactNode }) {
  const [choice, setChoice] = useState<ThemeChoice>(storedChoice);
  const [isSystemDark, setIsSystemDark] = useState(() => darkQuery().matches);
  useEffect(() => {
    const query = darkQuery();
    const onChange = () => setIsSystemDark(query.matches);
    query.addEventListener('change', onChange);
    return () => query.removeEventListener('change', onChange);
  }, []);
  const choose = useCallback((next: ThemeChoice) => {
    applyChoice(next);
    setChoice(next);
  }, []);
  const shown = choice === 'system' ? (isSystemDark ? 'dark' : 'light') : choice;
  const value = useMemo(() => ({ choice, shown, choose }) as const, [choice, shown, choose]);
  return <ThemeContext value={value}>{children}</ThemeContext>;
}

const darkQuery = () => window.matchMedia('(prefers-color-scheme: dark)');

function storedChoice(): ThemeChoice {
  try {
    const stored = localStorage.getItem(STORAGE_KEY);
    return stored === 'light' || stored === 'dark' ? stored : 'system';
  } catch {
    return 'system';
  }
}

function applyChoice(choice: ThemeChoice): void {
  if (choice === 'system') delete document.documentElement.dataset.theme;
  else document.documentElement.dataset.theme = choice;
  try {
    if (choice === 'system') localStorage.removeItem(STORAGE_KEY);
    else localStorage.setItem(STORAGE_KEY, choice);
  } catch {
    // Storage may be closed to us; the choice then lasts as long as the page.
  }
}
