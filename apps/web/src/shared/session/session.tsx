import type { Me, MembershipView, Permission, Role } from '@app/contracts';
import { createContext, useContext } from 'react';

export interface Session {
  me: Me;
  /** The plant that every page shows. */
  plant: MembershipView['plant'];
  roles: Role[];
  /** Lines of this plant that the person is assigned to. */
  lineIds: number[];
  /** May this person do that at this plant? The server decides; this only spares them a button. */
  can: (permission: Permission) => boolean;
  choosePlant: (plantId: number) => void;
  signOut: () => Promise<void>;
}

export const SessionContext = createContext<Session | null>(null);

/** The person who is signed in. Only below the signed-in part of the app. */
export function useSession(): Session {
  const session = useContext(SessionContext);
  if (session === null) throw new Error('useSession stands outside the signed-in part of the app.');
  return session;
}
