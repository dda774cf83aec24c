import { invitationMail, type InvitationFacts } from './invitation';
import { passwordResetMail } from './password-reset';

const URL = 'https://ebbline.overdale.example/invitation/Zm9yIHRlc3Rz';
const facts: InvitationFacts = {
  name: 'Wenna Pascoe',
  plantName: 'Overdale <Mill>',
  by: 'Tamsin Okafor',
  roles: 'quality engineer and line lead',
  lines: ['Kiln 1', 'Press 4'],
  url: URL,
  until: '18 Mar 2026, 13:00 (Europe/Lisbon)',
};

describe('the mail that invites', () => {
  it('says who invites whom to what, with the link and its end, in either part', () => {
    const mail = invitationMail(facts);
    expect(mail.subject).toBe('Overdale <Mill> on Ebbline: an invitation for you');
    for (const part of [mail.text, mail.html])
      for (const fact of [
        'Tamsin Okafor',
        'Wenna Pascoe',
        'quality engineer and line lead',
        'assigned to Kiln 1 and Press 4.',
        URL,
        '18 Mar 2026, 13:00 (Europe/Lisbon)',
      ])
        expect(part).toContain(fact);
    expect(mail.html).toContain(`<a href="${URL}"`);
    expect(mail.html).toContain('Overdale &lt;Mill&gt;');
    expect(mail.html).not.toMatch(/<Mill>|<img|<link|<style|url\(/);
  });

  it('asks nobody for a password who has one', () => {
    const { text } = invitationMail({ ...facts, lines: [], until: null, url: 'https://ebbline.overdale.example/' });
    expect(text).toContain('as quality engineer and line lead.');
    expect(text).toContain('the password that you have');
    expect(text).not.toMatch(/works once|Choose/);
  });
});

describe('the mail for a forgotten password', () => {
  it('has the link, its end, and what to do when somebody else asked', () => {
    const mail = passwordResetMail({ name: 'Wenna Pascoe', url: URL, until: '11 Mar 2026, 13:00 (Europe/Lisbon)' });
    for (const part of [mail.text, mail.html])
      for (const fact of ['Wenna Pascoe', URL, '11 Mar 2026, 13:00 (Europe/Lisbon)', 'If that was not you'])
        expect(part).toContain(fact);
  });
});
