import { type Theme, THEMES } from '@app/contracts';
import { useKeptTheme } from '../../../shared/session/kept-theme';

const NAMES: Record<Theme, string> = {
  system: 'as the system says',
  light: 'day theme',
  dark: 'night theme',
};

export function ThemeFields() {
  const { choice, choose } = useKeptTheme();
  return (
    <fieldset className="profile__choices">
      <legend className="visually-hidden">Theme</legend>
      {THEMES.map((theme) => (
        <label key={theme} className="choice">
          <input type="radio" name="theme" checked={choice === theme} onChange={() => choose(theme)} />
          {NAMES[theme]}
        </label>
      ))}
    </fieldset>
  );
}
