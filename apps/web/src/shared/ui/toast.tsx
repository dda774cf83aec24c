import { Toast } from 'primereact/toast';
import { createContext, useCallback, useContext, useMemo, useRef, type ReactNode } from 'react';
import { asProblem } from '../api/problem';

interface Notify {
  /** A sentence about something that was done. */
  done: (sentence: string) => void;
  /** An action without a form failed. */
  failed: (error: unknown) => void;
}

const ToastContext = createContext<Notify>({ done: () => undefined, failed: () => undefined });

/** For actions without a form; a form shows its own errors. */
export const useToast = () => useContext(ToastContext);

export function ToastProvider({ children }: { children: ReactNode }) {
  const toast = useRef<Toast>(null);
  const done = useCallback((sentence: string) => {
    toast.current?.show({ severity: 'success', className: 'toast--done', detail: sentence, life: 6_000 });
  }, []);
  const failed = useCallback((error: unknown) => {
    const { detail, correlationId } = asProblem(error);
    const summary = correlationId === null ? undefined : `Reference ${correlationId}`;
    toast.current?.show({ severity: 'error', className: 'toast--failed', detail, summary, life: 12_000 });
  }, []);
  const notify = useMemo(() => ({ done, failed }), [done, failed]);
  return (
    <ToastContext value={notify}>
      {children}
      <Toast ref={toast} position="bottom-right" />
    </ToastContext>
  );
}
