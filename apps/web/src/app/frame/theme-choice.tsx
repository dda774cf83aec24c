import { useKeptTheme } from '../../shared/session/kept-theme';

/** Day or night. Until somebody chooses, the system does. */
export function ThemeChoice() {
  const { shown, choose } = useKeptTheme();
  const next = shown === 'dark' ? 'light' : 'dark';
  return (
    <button type="button" className="action action--plain" onClick={() => choose(next)} aria-pressed={shown === 'dark'}>
      {next === 'dark' ? 'Night theme' : 'Day theme'}
    </button>
  );
}
