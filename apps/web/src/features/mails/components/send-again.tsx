import type { MailListItem } from '@app/contracts';
import { Action, type ActionKind } from '../../../shared/ui/action';
import { useSendAgain } from '../api/mails';

interface SendAgainProps {
  mail: MailListItem;
  kind: ActionKind;
  onSent?: (mailId: number) => void;
}

export function SendAgain({ mail, kind, onSent }: SendAgainProps) {
  const sending = useSendAgain(mail.recipient, onSent);
  return (
    <Action
      kind={kind}
      isBusy={sending.isPending}
      onPress={() => sending.mutate(mail.id)}
      label={`Send the mail “${mail.subject}” to ${mail.recipient} again`}
    >
      {sending.isPending ? 'Sending…' : 'Send again'}
    </Action>
  );
}
