import type { MailListItem } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useSession } from '../../../shared/session/session';
import { FoldingTable } from '../../../shared/ui/folding-table';
import { When } from '../../../shared/ui/when';
import { kindWords, mailFate } from '../mail-words';
import { SendAgain } from './send-again';

export function MailTable({ mails }: { mails: MailListItem[] }) {
  return (
    <FoldingTable
      caption="Mails, newest first"
      items={mails}
      keyOf={(mail) => mail.id}
      columns={[
        {
          name: 'Subject',
          isLead: true,
          cell: (mail) => <Link to={urls.mail(mail.id)}>{mail.subject}</Link>,
        },
        { name: 'To', cell: (mail) => <span className="mails__recipient">{mail.recipient}</span> },
        { name: 'About', cell: (mail) => kindWords(mail.kind) },
        { name: 'Written', cell: (mail) => <When at={mail.createdAt} form="short" /> },
        { name: 'What became of it', cell: (mail) => <Fate mail={mail} /> },
      ]}
    />
  );
}

function Fate({ mail }: { mail: MailListItem }) {
  const { plant } = useSession();
  return (
    <div className="mails__fate">
      <span className={mail.state === 'failed' ? 'mails__failed' : undefined}>{mailFate(mail, plant.timeZone)}</span>
      {mail.state !== 'sent' && mail.lastError !== null && <span className="mails__error">{mail.lastError}</span>}
      {mail.state === 'failed' && <SendAgain mail={mail} kind="plain" />}
    </div>
  );
}
