import type { Me, SignInAnswer } from '@app/contracts';
import { createContext, useCallback, useContext, useEffect, useMemo, useState, type ReactNode } from 'react';
import { apiGet, apiSend } from '../api/client';
import { queryClient } from '../api/query-client';
import { endSession, keepToken, onSessionEnd, refreshToken } from '../api/token';
import { useTheme } from '../theme/theme';

export type AuthState =
  | { kind: 'checking' }
  | { kind: 'unreachable'; error: unknown }
  | { kind: 'signed_out'; how: 'not_yet' | 'expired' | 'left' }
  | { kind: 'signed_in'; me: Me };

interface Auth {
  state: AuthState;
  signIn: (email: string, password: string) => Promise<void>;
  signOut: () => Promise<void>;
  checkAgain: () => void;
  /** After something that changes what the person may do where, or a plant's name. */
  readMeAgain: () => Promise<void>;
}

const AuthContext = createContext<Auth | null>(null);

export function useAuth(): Auth {
  const auth = useContext(AuthContext);
  if (auth === null) throw new Error('useAuth stands outside the AuthProvider.');
  return auth;
}

export function AuthProvider({ children }: { children: ReactNode }) {
  const [state, setState] = useState<AuthState>({ kind: 'checking' });
  const [round, setRound] = useState(0);
  const { choose: showTheme } = useTheme();
  const theme = state.kind === 'signed_in' ? state.me.theme : null;

  // The theme that is kept with the person goes before what this browser showed last.
  useEffect(() => {
    if (theme !== null) showTheme(theme);
  }, [theme, showTheme]);

  useEffect(() => {
    let isCurrent = true;
    void resume().then((next) => isCurrent && setState(next));
    return () => {
      isCurrent = false;
    };
  }, [round]);

  useEffect(() => {
    return onSessionEnd(() => {
      queryClient.clear();
      setState((before) => ({ kind: 'signed_out', how: before.kind === 'signed_in' ? 'expired' : 'not_yet' }));
    });
  }, []);

  const signIn = useCallback(async (email: string, password: string) => {
    const { accessToken } = await apiSend<SignInAnswer>('POST', '/auth/sign-in', { email, password });
    keepToken(accessToken);
    queryClient.clear();
    setState({ kind: 'signed_in', me: await apiGet<Me>('/me') });
  }, []);

  const signOut = useCallback(async () => {
    await apiSend<void>('POST', '/auth/sign-out').catch(() => undefined);
    endSession();
    setState({ kind: 'signed_out', how: 'left' });
  }, []);

  const checkAgain = useCallback(() => {
    setState({ kind: 'checking' });
    setRound((before) => before + 1);
  }, []);

  const readMeAgain = useCallback(async () => {
    const me = await apiGet<Me>('/me');
    setState((before) => (before.kind === 'signed_in' ? { kind: 'signed_in', me } : before));
  }, []);

  const value = useMemo(
    () => ({ state, signIn, signOut, checkAgain, readMeAgain }),
    [state, signIn, signOut, checkAgain, readMeAgain],
  );
  return <AuthContext value={value}>{children}</AuthContext>;
}

/** Picks up the session that the refresh cookie stands for, if any. */
async function resume(): Promise<AuthState> {
  try {
    if (!(await refreshToken())) return { kind: 'signed_out', how: 'not_yet' };
    return { kind: 'signed_in', me: await apiGet<Me>('/me') };
  } catch (error) {
    return { kind: 'unreachable', error };
  }
}
