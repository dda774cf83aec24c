import '../mails.css';
import type { MailView } from '@app/contracts';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useShowsLine } from '../../../shared/line-context/line-context';
import { useSession } from '../../../shared/session/session';
import { Loaded } from '../../../shared/ui/loaded';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { When } from '../../../shared/ui/when';
import { useMail } from '../api/mails';
import { MailAttachments, MailContent } from '../components/mail-content';
import { SendAgain } from '../components/send-again';
import { kindWords, mailFate } from '../mail-words';

/** What did this mail say, and did it arrive? */
export function MailPage() {
  const query = useMail(Number(useParams().mailId));
  useShowsLine(undefined, query.data?.plantId);
  return (
    <Loaded query={query} failure="The mail could not be loaded.">
      {(mail) => <Mail key={mail.id} mail={mail} />}
    </Loaded>
  );
}

function Mail({ mail }: { mail: MailView }) {
  const { plant } = useSession();
  const navigate = useNavigate();
  const follow = (id: number) => {
    if (id !== mail.id) void navigate(urls.mail(id));
  };
  return (
    <>
      <PageHeading
        title={mail.subject}
        lead={
          <>
            To {mail.recipient}, about: {kindWords(mail.kind)}, written <When at={mail.createdAt} />.{' '}
            <Link to={urls.mails(mail.plantId)}>All mails</Link>
          </>
        }
      />
      <Sheet
        title="What became of it"
        tools={mail.maySendAgain ? <SendAgain mail={mail} kind="quiet" onSent={follow} /> : undefined}
        margin={<p>A mail that was sent goes out again as a new one; one that was given up is tried anew.</p>}
      >
        <p>{mailFate(mail, plant.timeZone)}</p>
        {mail.lastError !== null && <p className="mails__error">{mail.lastError}</p>}
        {mail.history.map((entry) => (
          <p key={`${entry.at} ${entry.sentence}`} className="soft">
            <When at={entry.at} form="short" />: {entry.sentence}.
          </p>
        ))}
      </Sheet>
      <MailContent mail={mail} />
      <MailAttachments mail={mail} />
    </>
  );
}
