import { useMemo } from 'react';
import { useTheme } from '../theme/theme';
import { tokenColour, type ColourToken } from '../theme/token-colour';

/** The shown theme as a canvas can use it. */
export interface ChartTheme {
  shown: 'light' | 'dark';
  colour: (token: ColourToken) => string;
  fontFamily: string;
}

function readTheme(shown: 'light' | 'dark'): ChartTheme {
  const known = new Map<ColourToken, string>();
  const colour = (token: ColourToken) => {
    let found = known.get(token);
    if (found === undefined) known.set(token, (found = tokenColour(token)));
    return found;
  };
  return { shown, colour, fontFamily: getComputedStyle(document.body).fontFamily };
}

/** A new object when the theme changes, so that charts draw again. */
export function useChartTheme(): ChartTheme {
  const { shown } = useTheme();
  return useMemo(() => readTheme(shown), [shown]);
}
