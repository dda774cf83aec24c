import type { Page } from 'playwright-core';
import { NEXT_SHIFT, shiftWorkbook } from '../../support/browser-plant';
import { Trial } from '../../support/browser';
import { FramePage } from '../pages/frame.page';
import { HoldPage } from '../pages/hold.page';
import { IntakePage } from '../pages/intake.page';
import { SignInPage } from '../pages/sign-in.page';

const PEOPLE_OF_THE_LINE = ['engineer2', 'engineer', 'lead', 'manager'].map((name) => `${name}@marrowby.example`);
/** Of the shift's four lots. The first is released, the second scrapped. */
const [LIGHT_LOT, THICK_LOT] = ['24502', '24504'];

let trial: Trial;
beforeAll(async () => {
  trial = await Trial.start();
}, 180_000);
afterAll(() => trial?.close());

/** The recipients of some mails, in alphabetical order, each as often as it came. */
const recipients = (mails: { to: string }[]): string[] => mails.map(({ to }) => to).sort();
/** The first address in a mail that leads to a hold. */
const holdLinkIn = (text: string): string => /http:\/\/\S+\/holds\/\d+/.exec(text)?.[0] ?? '';

describe('an ordinary shift', () => {
  let engineer: Page;
  let lead: Page;
  let manager: Page;

  test('the engineer uploads the workbook and sees what was recognised', async () => {
    engineer = await trial.open();
    await engineer.goto('/');
    await new SignInPage(engineer).signIn('engineer');
    const frame = new FramePage(engineer);
    const intake = new IntakePage(engineer);
    await frame.to('Intake');
    await intake.upload({ name: 'coater-2 early.xlsx', bytes: await shiftWorkbook('long', [NEXT_SHIFT]) });
    await frame.heading('coater-2 early.xlsx: needs attention').waitFor();
    expect(await intake.accounting.innerText()).toMatch(/^560 rows read = 560 new \+ 0 already there \+ 0 not used/);
    expect(await frame.sheet('How it is read: correct it here').innerText()).toContain('Coat weight');
    for (const lot of ['24501', LIGHT_LOT, '24503', THICK_LOT]) expect(await intake.lots.innerText()).toContain(lot);
  });

  test('confirmed, it goes through by itself; the two bad lots are held', async () => {
    const intake = new IntakePage(engineer);
    await intake.confirm.click();
    await intake.status.first().waitFor();
    await new FramePage(engineer).heading('coater-2 early.xlsx: scored').waitFor();
    const held = await intake.outcome.getByRole('listitem').allInnerTexts();
    expect(held).toHaveLength(2);
    expect(await intake.cameOfIt()).toMatch(/^4 lots scored on .*; 2 are held:/);
    expect(held[0]).toMatch(new RegExp(`Lot ${LIGHT_LOT} lies [\\d.]+\u202fσ below its baseline in coat weight`));
    expect(held[1]).toMatch(new RegExp(`Lot ${THICK_LOT} .* above its baseline in web thickness`));
    expect(await intake.accounting.innerText()).toMatch(/560 rows read = 560 used \+ 0 already there \+ 0 not used/);
  });

  test('who confirmed it may not decide, and reads why', async () => {
    await new IntakePage(engineer).openHold(LIGHT_LOT);
    const hold = new HoldPage(engineer);
    await hold.decision.waitFor();
    expect(await hold.decision.innerText()).toMatch(/manager decides held lots|You confirmed the intake/);
    expect(await hold.password.count()).toBe(0);
  });

  test('one mail about both lots comes to each person of the line', async () => {
    const mails = await trial.mails(PEOPLE_OF_THE_LINE.length);
    expect(recipients(mails)).toEqual(PEOPLE_OF_THE_LINE);
    const [{ subject, text, html }] = mails;
    expect(subject).toBe(`2 lots held, Coater 2: ${LIGHT_LOT}, ${THICK_LOT}`);
    for (const fact of ['MW-0217', 'Coat weight', 'g/m²', 'baseline', 'limit', 'not corrected'])
      expect(text.toLowerCase()).toContain(fact.toLowerCase());
    expect(html).toContain(holdLinkIn(text));
  });

  test('its link opens the hold once the line lead has signed in, who sets the lot aside', async () => {
    const mail = (await trial.mails(1)).find(({ to }) => to.startsWith('lead@'));
    lead = await trial.open();
    await lead.goto(holdLinkIn(mail?.text ?? ''));
    await new SignInPage(lead).signIn('lead');
    await new FramePage(lead).heading(`Lot ${LIGHT_LOT}, Coater 2: held`).waitFor();
    const hold = new HoldPage(lead);
    await hold.confirmSetAside('Bay 4');
    await hold.setAside.getByRole('status').waitFor();
    expect(await hold.setAside.innerText()).toMatch(/Colin Prewett confirmed .* that the lot stands apart: Bay 4\./);
    expect(await hold.decision.innerText()).toContain('A quality manager decides held lots.');
  });

  test('the manager’s wrong password is told at its field, and nothing is decided', async () => {
    manager = await trial.open();
    await manager.goto('/');
    await new SignInPage(manager).signIn('manager');
    await manager.getByRole('link', { name: new RegExp(`^Decide lot ${LIGHT_LOT}`) }).click();
    const hold = new HoldPage(manager);
    await hold.decide('Release', 'Retained samples weigh within specification.', 'not my password');
    await hold.passwordError.waitFor();
    expect(await hold.passwordError.innerText()).toMatch(/password/i);
    expect(await manager.evaluate('document.activeElement.type')).toBe('password');
    expect(await hold.signature.count()).toBe(0);
  });

  test('with the right one the manager releases the first lot and scraps the second', async () => {
    const hold = new HoldPage(manager);
    await hold.sign('Release');
    await hold.signature.waitFor();
    expect(await hold.signature.innerText()).toMatch(/Adaeze Thornbury, .*: released/);
    const frame = new FramePage(manager);
    await frame.to('Desk');
    await manager.getByRole('link', { name: new RegExp(`^Decide lot ${THICK_LOT}`) }).click();
    await frame.heading(`Lot ${THICK_LOT}, Coater 2: held`).waitFor();
    await hold.decide('Scrap', 'Thick base film along the whole lot.');
    await hold.signature.waitFor();
    expect(await hold.signature.innerText()).toMatch(/Adaeze Thornbury, .*: scrapped/);
    await frame.to('Desk');
    await manager.getByText('Nothing waits for you.').waitFor();
  });

  test('the line is mailed about each decision, each person once', async () => {
    const count = 3 * PEOPLE_OF_THE_LINE.length;
    const [released, scrapped] = [`Lot ${LIGHT_LOT} released`, `Lot ${THICK_LOT} scrapped`].map(async (subject) =>
      (await trial.mails(count)).filter((mail) => mail.subject.startsWith(subject)),
    );
    expect(recipients(await released)).toEqual(PEOPLE_OF_THE_LINE);
    expect(recipients(await scrapped)).toEqual(PEOPLE_OF_THE_LINE);
    expect((await trial.mails(count)).length).toBe(count);
    await lead.goto(holdLinkIn((await released)[0].text));
    await new HoldPage(lead).signature.waitFor();
    expect(await new HoldPage(lead).history.innerText()).toContain('Retained samples weigh within specification.');
  });

  test('nothing went wrong in a browser but the wrong password', () => {
    expect(trial.troubles).toEqual(['POST /api/holds/#/decision 400']);
  });
});
