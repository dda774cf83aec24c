import type { MailListItem } from '@app/contracts';
import { mailFiltersIn, mailsPath } from './filters';
import { countsSentence, kindWords, mailFate, sizeWords } from './mail-words';

const mail: MailListItem = {
  id: 1,
  kind: 'held-lots',
  recipient: 'lead@marrowby.example',
  subject: 'Lot 24118 held',
  state: 'waiting',
  createdAt: '2026-07-01T10:00:00Z',
  sentAt: null,
  attempts: 0,
  nextAttemptAt: '2026-07-01T11:30:00Z',
  lastError: null,
};

describe('what became of a mail', () => {
  const fate = (differs: Partial<MailListItem>) => mailFate({ ...mail, ...differs }, 'Europe/London');

  it('is told with its times in the plant’s zone and its attempts', () => {
    expect(fate({})).toBe('Waits to be sent.');
    expect(fate({ attempts: 3, lastError: 'refused' })).toBe('Waits after 3 attempts; the next is at 1 Jul 12:30.');
    expect(fate({ state: 'sent', attempts: 1, sentAt: '2026-07-01T10:00:05Z' })).toBe('Sent 1 Jul 11:00.');
    expect(fate({ state: 'sent', attempts: 2, sentAt: '2026-07-01T10:00:05Z' })).toBe(
      'Sent 1 Jul 11:00 after 2 attempts.',
    );
    expect(fate({ state: 'failed', attempts: 1 })).toBe('Given up after one attempt.');
  });

  it('of all mails is a sentence that names no state without mails but that of sent ones', () => {
    expect(countsSentence({ waiting: 0, failed: 0, sent: 0 })).toBe('No mail has been written yet.');
    expect(countsSentence({ waiting: 1, failed: 2, sent: 1 })).toBe('1 waits, 2 could not be sent, 1 was sent.');
    expect(countsSentence({ waiting: 0, failed: 0, sent: 41 })).toBe('41 were sent.');
  });

  it('has its kind and sizes in words', () => {
    expect(kindWords('hold-reminder')).toBe('reminder of an old hold');
    expect(kindWords('something-new')).toBe('something-new');
    expect([12, 15_400, 2_340_000].map(sizeWords)).toEqual(['12 bytes', '15 kB', '2.3 MB']);
  });
});

describe('the filters of mails', () => {
  it('come from the address and go to the API; what is malformed is not set', () => {
    const filters = mailFiltersIn(new URLSearchParams('state=failed&kind=decision&page=3'));
    expect(mailsPath(7, filters)).toBe('/plants/7/mails?state=failed&kind=decision&page=3&pageSize=50');
    expect(mailFiltersIn(new URLSearchParams('state=lost&page=-1'))).toEqual({ state: null, kind: null, page: 1 });
  });
});
