import type { MailView } from '@app/contracts';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Sheet } from '../../../shared/ui/sheet';
import { sizeWords } from '../mail-words';

/** The mail as its recipient sees it: with styles, and as plain text. Nothing in it runs or loads. */
export function MailContent({ mail }: { mail: MailView }) {
  if (mail.isPrivate || mail.html === null) {
    return (
      <Sheet title="The mail">
        <EmptyNote>Its link lets {mail.recipient} in, so nobody else reads it here.</EmptyNote>
      </Sheet>
    );
  }
  return (
    <>
      <Sheet title="With styles" isFlush>
        <iframe
          className="mail__html"
          title="The mail with styles"
          sandbox=""
          referrerPolicy="no-referrer"
          srcDoc={mail.html}
        />
      </Sheet>
      <Sheet title="As plain text">
        <pre className="mail__text" tabIndex={0}>
          {mail.text}
        </pre>
      </Sheet>
    </>
  );
}

export function MailAttachments({ mail }: { mail: MailView }) {
  if (mail.attachments.length === 0) return null;
  return (
    <Sheet title="What goes with it">
      <ul className="mail__attachments">
        {mail.attachments.map(({ name, bytes, isInline }) => (
          <li key={name}>
            {name}, {sizeWords(bytes)}
            {isInline && ', shown in the mail'}
          </li>
        ))}
      </ul>
    </Sheet>
  );
}
