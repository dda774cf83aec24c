import type { ApiTokenView } from '@app/contracts';
import { useEffect, useRef } from 'react';
import { Action } from '../../../shared/ui/action';
import { useToast } from '../../../shared/ui/toast';
import { useRevokeApiToken } from '../api/api-tokens';

interface RevokeQuestionProps {
  plantId: number;
  token: ApiTokenView;
  onClose: () => void;
}

/** Asked, since whatever uses the token stops with the next workbook. */
export function RevokeQuestion({ plantId, token, onClose }: RevokeQuestionProps) {
  const revoke = useRevokeApiToken(plantId);
  const { done, failed } = useToast();
  const element = useRef<HTMLDivElement>(null);
  useEffect(() => element.current?.focus(), []);
  const confirm = () =>
    revoke.mutate(token.id, {
      onSuccess: () => {
        done(`The token ${token.name} is revoked.`);
        onClose();
      },
      onError: failed,
    });
  return (
    <div ref={element} className="profile__note" role="group" aria-label={`Revoke ${token.name}`} tabIndex={-1}>
      <p>Whatever sends workbooks with {token.name} is refused from now on. This cannot be taken back.</p>
      <div className="form__actions">
        <Action kind="quiet" isBusy={revoke.isPending} onPress={confirm}>
          Revoke this token
        </Action>
        <Action kind="plain" onPress={onClose}>
          Leave it
        </Action>
      </div>
    </div>
  );
}
