import type { Page } from 'playwright-core';
import { Trial } from '../../support/browser';
import { createSeededPlant } from '../../support/browser-plant';
import { FramePage } from '../pages/frame.page';
import { SetUpPage } from '../pages/set-up.page';
import { SignInPage } from '../pages/sign-in.page';

let trial: Trial;
let administrator: Page;
let manager: Page;
beforeAll(async () => {
  trial = await Trial.start(createSeededPlant);
  [administrator, manager] = [await trial.open(), await trial.open()];
}, 180_000);
afterAll(() => trial?.close());

describe('a second plant, through the pages', () => {
  test('the administrator makes it and reads what is missing', async () => {
    await administrator.goto('/');
    await new SignInPage(administrator).signIn('admin');
    const setUp = new SetUpPage(administrator);
    const frame = new FramePage(administrator);
    await setUp.open();
    await frame.heading('Set-up of Marrowby Works').waitFor();
    await administrator.getByText('Nothing is missing: Marrowby Works is ready for its first workbook.').waitFor();
    await setUp.makePlant({ name: 'Overdale Capping', timeZone: 'America/Chicago' });
    await frame.heading('Set-up of Overdale Capping').waitFor();
    await setUp.missing.waitFor();
    expect(await setUp.missing.getByRole('listitem').count()).toBe(8);
    expect(await setUp.inPlace.innerText()).toContain('Times of the plant are those of America/Chicago.');
  });

  test('a line and the shifts; a name that is taken is told at its field', async () => {
    const setUp = new SetUpPage(administrator);
    await setUp.part('Lines and shifts');
    await setUp.add('Add a line', { Name: 'Capper 4' }, 'Add the line');
    await setUp.row('Lines', 'Capper 4').waitFor();
    await setUp.press('Add a line');
    await setUp.type({ Name: 'Capper 4' });
    await administrator.keyboard.press('Enter');
    await setUp.fieldError.waitFor();
    expect(await setUp.fieldError.innerText()).toMatch(/name/i);
    expect(await administrator.evaluate('document.activeElement.getAttribute("aria-invalid")')).toBe('true');
    await administrator.keyboard.press('Escape');
    expect(await administrator.evaluate('document.activeElement.textContent')).toBe('Add a line');
    await setUp.add('State the shifts', { 'From which day on': '2026-01-01' }, 'State these shifts');
    await administrator.getByText('From 2026-01-01 on, in force. The shifts cover the whole day.').waitFor();
  });

  test('a product, a characteristic, a gauge and the channel that joins them', async () => {
    const setUp = new SetUpPage(administrator);
    await setUp.part('Products');
    await setUp.add('Add a product', { Code: 'CAP-28', Name: 'Cap 28 mm' }, 'Add the product');
    await setUp.part('Characteristics');
    await setUp.press('Add a characteristic');
    await setUp.type({ Name: 'Torque', Unit: 'N·m', Resolution: '0,1' });
    await setUp.press('Add the characteristic');
    expect(await setUp.fieldError.innerText()).toBe('Write a number with a decimal point, such as 12.5.');
    await setUp.type({ Resolution: '0.01' });
    await setUp.press('Add the characteristic');
    await setUp.row('Characteristics', 'Torque').waitFor();
    await setUp.part('Gauges');
    await setUp.add('Add a gauge', { 'Asset number': 'TQ-31', Kind: 'torque cell' }, 'Add the gauge');
    await setUp.part('Channels');
    await setUp.add(
      'Add a channel',
      { Name: 'Torque', Position: 'head', 'Serves since': '2026-01-01' },
      'Add the channel',
    );
    expect(await setUp.row('Channels', 'Torque').innerText()).toMatch(/Capper 4[^]*TQ-31, since 1 Jan 2026/);
  });

  test('a specification waits for a second person', async () => {
    const setUp = new SetUpPage(administrator);
    await setUp.part('Specifications');
    await setUp.add(
      'Propose a specification of CAP-28',
      {
        'Nominal value': '2',
        'Lower specification limit': '1.6',
        'Upper specification limit': '2.4',
        'In force from': '2026-01-01',
        Reason: 'Drawing 28-114.',
      },
      'Propose this specification',
    );
    const table = await setUp.table('Specifications of CAP-28').innerText();
    expect(table).toContain('none yet');
    expect(table).toMatch(/Proposed: nominal value 2\.00\u202fN·m[^]*Drawing 28-114\./);
    expect(await administrator.getByRole('button', { name: /^Approve/ }).count()).toBe(0);
    await setUp.part('Readiness');
    expect(await setUp.missing.innerText()).toContain(
      'No approved specification for CAP-28. 1 proposed, waiting for a quality manager.',
    );
  });

  test('the quality manager finds it on the desk and signs it', async () => {
    await administrator.getByRole('link', { name: 'People', exact: true }).first().click();
    await new SetUpPage(administrator).invite('manager@marrowby.example', 'Adaeze Thornbury', 'quality manager');
    await manager.goto('/');
    await new SignInPage(manager).signIn('manager');
    const setUp = new SetUpPage(manager);
    await setUp.choosePlant('Overdale Capping');
    await manager.getByRole('link', { name: /^Read the specification: A specification of CAP-28, Torque/ }).click();
    await setUp.approve('Torque on CAP-28', 1, 'not my password');
    await setUp.fieldError.waitFor();
    await setUp.approve('Torque on CAP-28', 1);
    await setUp.row('Specifications of CAP-28', '1, since 1 Jan 2026').waitFor();
    expect(await manager.getByRole('button', { name: 'Add a line' }).count()).toBe(0);
  });

  test('then only people are missing, and nothing is too wide for a phone', async () => {
    const setUp = new SetUpPage(administrator);
    await setUp.open();
    await new FramePage(administrator).heading('Set-up of Overdale Capping').waitFor();
    await administrator.reload();
    await setUp.missing.waitFor();
    expect(await setUp.missing.getByRole('listitem').allInnerTexts()).toEqual([
      expect.stringMatching(/^No quality engineer, no line lead yet\./),
    ]);
    await administrator.setViewportSize({ width: 390, height: 844 });
    const frame = new FramePage(administrator);
    const wide: string[] = [];
    for (const part of [
      'Plant',
      'Lines and shifts',
      'Products',
      'Characteristics',
      'Specifications',
      'Gauges',
      'Channels',
    ]) {
      await setUp.part(part);
      await administrator.waitForLoadState('networkidle');
      if (await frame.isWiderThanWindow()) wide.push(part);
    }
    expect(wide).toEqual([]);
  });

  test('nothing went wrong in a browser but what was meant to', () => {
    expect(trial.troubles).toEqual([
      'POST /api/plants/#/set-up/lines 409',
      'POST /api/specification-proposals/#/approval 400',
    ]);
  });
});
