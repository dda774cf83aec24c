import type { Theme } from '@app/contracts';
import { useCallback } from 'react';
import { apiSend } from '../api/client';
import { useTheme } from '../theme/theme';
import { useToast } from '../ui/toast';

/** The theme of who is signed in: shown at once, and kept for wherever they sign in next. */
export function useKeptTheme() {
  const { choice, shown, choose: show } = useTheme();
  const { failed } = useToast();
  const choose = useCallback(
    (theme: Theme) => {
      show(theme);
      apiSend<void>('PATCH', '/me', { theme }).catch(failed);
    },
    [show, failed],
  );
  return { choice, shown, choose };
}
