import type { Me } from '@app/contracts';
import { useCallback, useMemo, useState, type ReactNode } from 'react';
import { readStored, writeStored } from '../storage';
import { useAuth } from './auth';
import { SessionContext, type Session } from './session';

const PLANT_KEY = 'ebbline.plant';

interface SessionProviderProps {
  me: Me;
  /** In place of everything, for a person without a role at any plant. */
  nowhere: ReactNode;
  children: ReactNode;
}

/** Puts the person and the chosen plant before every page. */
export function SessionProvider({ me, nowhere, children }: SessionProviderProps) {
  const { signOut } = useAuth();
  const [plantId, setPlantId] = useState(() => Number(readStored(PLANT_KEY)));
  const choosePlant = useCallback((id: number) => {
    writeStored(PLANT_KEY, String(id));
    setPlantId(id);
  }, []);
  const membership = me.memberships.find((item) => item.plant.id === plantId) ?? me.memberships.at(0);
  const session = useMemo<Session | null>(() => {
    if (membership === undefined) return null;
    return {
      me,
      plant: membership.plant,
      roles: membership.roles,
      lineIds: membership.lineIds,
      can: (permission) => membership.permissions.includes(permission),
      choosePlant,
      signOut,
    };
  }, [me, membership, choosePlant, signOut]);
  if (session === null) return nowhere;
  return <SessionContext value={session}>{children}</SessionContext>;
}
