import { type HistoryEntry, type MailListItem, type MailView, PRIVATE_MAIL_KINDS } from '@app/contracts';
import type { MailAttachmentRow, MailRow, WholeMail } from '@app/data';

export function toMailListItem(row: MailRow): MailListItem {
  return {
    id: row.id,
    kind: row.kind,
    recipient: row.recipient,
    subject: row.subject,
    state: row.state,
    createdAt: row.createdAt.toISOString(),
    sentAt: row.sentAt && row.sentAt.toISOString(),
    attempts: row.attempts,
    nextAttemptAt: row.state === 'waiting' ? row.nextAttemptAt.toISOString() : null,
    lastError: row.lastError,
  };
}

export function toMailView(mail: WholeMail, attachments: MailAttachmentRow[], history: HistoryEntry[]): MailView {
  const isPrivate = PRIVATE_MAIL_KINDS.includes(mail.kind);
  return {
    ...toMailListItem(mail),
    plantId: mail.plantId,
    text: isPrivate ? null : mail.text,
    html: isPrivate ? null : withInlinePictures(mail.html, attachments),
    isPrivate,
    attachments: attachments.map(({ name, mediaType, bytes, contentId }) => ({
      name,
      mediaType,
      bytes,
      isInline: contentId !== null,
    })),
    maySendAgain: mail.state !== 'waiting',
    history,
  };
}

/** A page shows `cid:` of no mail: the pictures go into the HTML as data. */
export function withInlinePictures(html: string, attachments: MailAttachmentRow[]): string {
  return attachments.reduce((text, { contentId, inlineBytes, mediaType }) => {
    if (contentId === null || inlineBytes === null || !/^image\/[\w.+-]+$/.test(mediaType)) return text;
    return text.replaceAll(`cid:${contentId}`, `data:${mediaType};base64,${inlineBytes.toString('base64')}`);
  }, html);
}
