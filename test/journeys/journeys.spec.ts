import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Browser } from 'playwright-core';
import { desk, launch, phone, Tab } from '../support/browser';
import { twoPortText } from '../support/fixtures';
import { Product } from '../support/product';

let product: Product;
let browser: Browser;

beforeAll(async () => {
  product = await Product.start();
  browser = await launch();
}, 300_000);
afterAll(async () => {
  await browser?.close();
  await product?.stop();
});

/** A tab in which a person of the demonstration is signed in and sees the boards. */
async function tabOf(role: string, size = desk, scheme: 'light' | 'dark' = 'light', nth = 0): Promise<Tab> {
  const tab = await Tab.open(browser, product.address, size, scheme);
  await tab.signIn(product.signIn(role, nth));
  await tab.page.waitForURL('**/boards');
  return tab;
}

async function openRevision(tab: Tab): Promise<void> {
  await tab.page.getByRole('link', { name: 'Revision B' }).first().click();
  await tab.page.getByRole('heading', { name: 'Revision B' }).waitFor();
}

async function openChannel(tab: Tab, name: string): Promise<void> {
  await openRevision(tab);
  await tab.page.getByRole('link', { name }).first().click();
  await tab.page.waitForURL('**/channels/**');
  await tab.page.locator('[data-limit]').first().waitFor();
}

const looks = [
  ['light', desk],
  ['dark', desk],
  ['light', phone],
  ['dark', phone],
] as const;

describe('every screen', () => {
  it.each(looks)('in the %s theme, %j, opens without a complaint or a barrier', async (scheme, size) => {
    const stranger = await Tab.open(browser, product.address, size, scheme);
    await stranger.goto('/sign-in');
    await stranger.page.getByRole('heading', { name: 'Sign in' }).waitFor();
    expect(await stranger.barriers()).toEqual([]);
    await stranger.goto('/mail');
    await stranger.page.getByRole('heading', { name: 'Mail', exact: true }).waitFor();
    expect(await stranger.barriers()).toEqual([]);
    expect(stranger.complaints).toEqual([]);
    await stranger.close();

    const admin = await tabOf('Administrator', size, scheme);
    for (const [path, heading] of [
      ['/people', 'People'],
      ['/account', 'Account'],
    ] as const) {
      await admin.goto(path);
      await admin.page.getByRole('heading', { name: heading, level: 1 }).waitFor();
      await admin.page.getByText('Rui Almeida').first().waitFor({ state: 'attached' });
      expect(await admin.barriers()).toEqual([]);
    }
    expect(admin.complaints).toEqual([]);
    await admin.close();

    const tab = await tabOf('Layout engineer', size, scheme);
    await tab.page.getByRole('link', { name: 'Heron line card' }).waitFor();
    expect(await tab.barriers()).toEqual([]);
    await tab.page.getByRole('link', { name: 'Heron line card' }).click();
    await tab.page.getByRole('heading', { name: 'Members' }).waitFor();
    expect(await tab.barriers()).toEqual([]);
    await tab.page.goBack();
    await openRevision(tab);
    await tab.page.getByRole('link', { name: 'Lane 3' }).first().waitFor();
    expect(await tab.barriers()).toEqual([]);
    await tab.page.getByRole('link', { name: 'Lane 3' }).first().click();
    await tab.page.locator('[data-limit]').first().waitFor();
    expect(await tab.barriers()).toEqual([]);
    expect(await tab.page.evaluate('document.documentElement.scrollWidth <= window.innerWidth')).toBe(true);
    expect(tab.complaints).toEqual([]);
    await tab.close();
  });
});

describe('a stranger', () => {
  it('is led to the sign-in and on to where they wanted to go', async () => {
    const tab = await Tab.open(browser, product.address);
    await tab.goto('/account');
    await tab.page.waitForURL('**/sign-in**');
    await tab.page.getByLabel(/mail/i).first().fill('nobody@demo.tollgate.example');
    await tab.page.getByLabel('Password', { exact: true }).fill('not the password');
    await tab.page.keyboard.press('Enter');
    await tab.page.getByText('do not go together').waitFor();
    // The network line of the refusal itself is all the console says.
    expect(tab.complaints).toEqual([expect.stringContaining('401')]);
    const person = product.signIn('SI reviewer');
    await tab.page.getByLabel(/mail/i).first().fill(person.email);
    await tab.page.getByLabel('Password', { exact: true }).fill(person.password);
    await tab.page.keyboard.press('Enter');
    await tab.page.waitForURL('**/account');
    await tab.page.getByRole('button', { name: `Menu of ${person.name}` }).click();
    await tab.page.getByRole('menuitem', { name: 'Sign out' }).click();
    await tab.page.waitForURL('**/sign-in**');
    await tab.goto('/boards');
    await tab.page.waitForURL('**/sign-in**');
    await tab.close();
  });
});

describe('a layout engineer', () => {
  it('edits a value with its unit, sees the verdict change, and finds it again', async () => {
    const tab = await tabOf('Layout engineer');
    await openChannel(tab, 'Lane 1');
    const verdict = tab.page.locator('[data-limit] tg-verdict').first();
    expect(await verdict.innerText()).toContain('Holds, informative limit');
    await tab.page.locator('[data-element="L2"] button.row').click();
    const length = tab.page.locator('[data-path="lengthM"]').first();
    const saved = tab.page.waitForResponse(
      (reply) => reply.request().method() === 'PUT' && reply.status() === 200,
    );
    await length.fill('60 in');
    await length.press('Enter');
    await tab.page.locator('[data-limit] tg-verdict', { hasText: 'Exceeds' }).first().waitFor();
    await saved;
    await tab.page.reload();
    await tab.page.locator('[data-limit] tg-verdict', { hasText: 'Exceeds' }).first().waitFor();
    expect(tab.complaints).toEqual([]);
    await tab.close();
  });

  it('is told at the field what cannot be read, and loses nothing typed', async () => {
    const tab = await tabOf('Layout engineer');
    await openChannel(tab, 'Lane 2');
    await tab.page.locator('[data-element="L2"] button.row').click();
    const length = tab.page.locator('[data-path="lengthM"]').first();
    await length.fill('3 parsec');
    await length.press('Enter');
    await tab.page.getByText('"parsec" is not a unit of length').first().waitFor();
    expect(await length.inputValue()).toBe('3 parsec');
    await tab.close();
  });

  it('uploads a measured part, and is told the line of one that is broken', async () => {
    const folder = mkdtempSync(join(tmpdir(), 'tg-parts-'));
    const [good, broken] = [join(folder, 'part.s2p'), join(folder, 'broken.s2p')];
    writeFileSync(good, twoPortText(30));
    writeFileSync(broken, '# GHz S RI R 50\n1 0 0 1 0 1 0 0 0\n2 0 0 one 0 1 0 0 0\n');
    const tab = await tabOf('Layout engineer');
    await openChannel(tab, 'Clock reference');
    await tab.page.locator('[data-element="M1"] button.row').click();
    await tab.page.locator('[data-upload]').setInputFiles(broken);
    await tab.page
      .getByText(/Line 3/)
      .first()
      .waitFor();
    await tab.page.locator('[data-upload]').setInputFiles(good);
    await tab.page
      .locator('[data-limit] tg-verdict', { hasText: /Holds|Exceeds/ })
      .first()
      .waitFor();
    rmSync(folder, { recursive: true });
    await tab.close();
  });

  it('and a colleague at one channel both keep their edits', async () => {
    const [one, two] = [await tabOf('Layout engineer'), await tabOf('Layout engineer', desk, 'light', 1)];
    await openChannel(one, 'Lane 0');
    await openChannel(two, 'Lane 0');
    const edit = async (tab: Tab, element: string, text: string) => {
      await tab.page.locator(`[data-element="${element}"] button.row`).click();
      const saved = tab.page.waitForResponse(
        (reply) => reply.request().method() === 'PUT' && reply.status() === 200,
      );
      const field = tab.page.locator('[data-path="lengthM"]').first();
      await field.fill(text);
      await field.press('Enter');
      await saved;
    };
    await edit(one, 'L1', '9.25 mm');
    await edit(two, 'L3', '15.5 mm');
    await one.page.reload();
    await one.page.locator('[data-element="L1"]', { hasText: '9.25 mm' }).waitFor();
    await one.page.locator('[data-element="L3"]', { hasText: '15.5 mm' }).waitFor();
    await one.close();
    await two.close();
  });
});

describe('two people at one field', () => {
  it('are shown both values, and the one that is chosen stays', async () => {
    const [one, two] = [await tabOf('Layout engineer'), await tabOf('Layout engineer', desk, 'light', 1)];
    await openChannel(one, 'Lane 3');
    await openChannel(two, 'Lane 3');
    const type = async (tab: Tab, text: string) => {
      await tab.page.locator('[data-element="L1"] button.row').click();
      await tab.page.locator('[data-path="lengthM"]').first().fill(text);
      await tab.page.keyboard.press('Tab');
    };
    // Held back on its way, so that the other's is saved first, and no news of it comes.
    await two.page.route('**/api/stream**', (route) => route.abort());
    let release: () => void = () => undefined;
    const held = new Promise<void>((resolve) => (release = resolve));
    await two.page.route('**/api/channels/*', async (route) => {
      if (route.request().method() === 'PUT') await held;
      await route.continue();
    });
    await type(two, '7.5 mm');
    const saved = one.page.waitForResponse(
      (reply) => reply.request().method() === 'PUT' && reply.status() === 200,
    );
    await type(one, '6.5 mm');
    await saved;
    release();
    const dialog = two.page.getByRole('dialog');
    await dialog.getByText('Both of you changed this channel').waitFor();
    expect(await dialog.innerText()).toContain('7.5 mm');
    expect(await dialog.innerText()).toContain('6.5 mm');
    expect(await two.barriers()).toEqual([]);
    await dialog.getByRole('radio').nth(1).check();
    await dialog.getByRole('button', { name: 'Join the edits' }).click();
    await two.page.locator('[data-element="L1"]', { hasText: '6.5 mm' }).waitFor();
    await one.page.reload();
    await one.page.locator('[data-element="L1"]', { hasText: '6.5 mm' }).waitFor();
    await one.close();
    await two.close();
  });
});

describe('an SI reviewer', () => {
  it('reads a channel and changes nothing', async () => {
    const tab = await tabOf('SI reviewer');
    await openChannel(tab, 'Lane 3');
    await tab.page.getByText('Read only').first().waitFor();
    for (const name of ['Undo', 'Redo', 'Add an element', 'Upload a file']) {
      expect(await tab.page.getByRole('button', { name }).count()).toBe(0);
    }
    await tab.page.locator('[data-element="L2"] button.row').click();
    await tab.page.locator('[data-path="lengthM"]').first().waitFor();
    expect(
      await tab.page
        .locator('tg-element-form')
        .locator('input:enabled, select:enabled, textarea:enabled')
        .count(),
    ).toBe(0);
    await tab.page.getByRole('link', { name: 'Settings', exact: true }).click();
    await tab.page.locator('tg-settings').waitFor();
    expect(
      await tab.page
        .locator('tg-settings')
        .locator('input:enabled, select:enabled, textarea:enabled')
        .count(),
    ).toBe(0);
    await tab.close();
  });
});

describe('a project manager', () => {
  it('sees what holds and what exceeds, and when the release is', async () => {
    const tab = await tabOf('Project manager');
    await tab.page.getByText(/Next release: Heron line card/).waitFor();
    await openRevision(tab);
    await tab.page.getByText('Exceeds, informative limit').first().waitFor();
    expect(await tab.page.getByRole('link', { name: 'New channel' }).count()).toBe(0);
    await tab.close();
  });
});

describe('an administrator', () => {
  it('invites a colleague, who chooses a password by the mail and signs in', async () => {
    const tab = await tabOf('Administrator');
    await tab.goto('/people?dialog=invite');
    const dialog = tab.page.getByRole('dialog');
    await dialog.getByLabel('Name', { exact: true }).fill('Noa Lindqvist');
    await dialog.getByLabel('Mail address').fill('noa@demo.tollgate.example');
    await dialog.getByText('SI reviewer').first().click();
    await dialog.getByRole('button', { name: 'Send the invitation' }).click();
    await tab.page.getByText('Noa Lindqvist').first().waitFor();
    await tab.close();

    const stranger = await Tab.open(browser, product.address);
    // The mail goes out through the outbox, a moment later.
    const mail = stranger.page.getByRole('link', { name: /Your invitation.*noa@demo/ });
    for (let attempt = 0; attempt < 30 && (await mail.count()) === 0; attempt++) {
      await stranger.goto('/mail');
      await stranger.page.getByRole('heading', { name: 'Mail', exact: true }).waitFor();
      await stranger.page.waitForTimeout(300);
    }
    await mail.click();
    await stranger.page.getByRole('article').getByRole('link').click();
    await stranger.page.getByLabel('New password').fill('a long enough password');
    await stranger.page.getByRole('button', { name: 'Set the password' }).click();
    await stranger.page.waitForURL('**/sign-in**');
    await stranger.signIn({ email: 'noa@demo.tollgate.example', password: 'a long enough password' });
    await stranger.page.waitForURL('**/boards');
    expect(stranger.complaints).toEqual([]);
    await stranger.close();
  });
});
