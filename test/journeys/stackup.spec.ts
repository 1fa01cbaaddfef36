import type { Browser, Page } from 'playwright-core';
import { desk, launch, phone, Tab } from '../support/browser';
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

/** A tab at the stackup of the newest revision of a board. */
async function atStackup(
  role: string,
  board = 'Heron line card',
  size = desk,
  scheme: 'light' | 'dark' = 'light',
  nth = 0,
): Promise<Tab> {
  const tab = await Tab.open(browser, product.address, size, scheme);
  await tab.signIn(product.signIn(role, nth));
  await tab.page.waitForURL('**/boards');
  await tab.page.getByRole('link', { name: board }).click();
  await tab.page
    .getByRole('link', { name: /^Revision/ })
    .first()
    .click();
  await tab.page.getByRole('link', { name: 'Stackup', exact: true }).click();
  await tab.page.getByRole('heading', { name: /^Stackup of/, level: 1 }).waitFor({ state: 'attached' });
  return tab;
}

const figure = (page: Page, title: string) => page.locator(`[data-figure="${title}"]`);
const ohmOf = async (page: Page, title: string) => Number.parseFloat(await figure(page, title).innerText());

/** Waits until a figure of the desk reads differently, and gives it. */
async function changed(page: Page, title: string, from: number): Promise<number> {
  for (let attempt = 0; attempt < 200; attempt++) {
    const now = await ohmOf(page, title);
    if (now !== from) return now;
    await page.waitForTimeout(50);
  }
  throw new Error(`${title} stays at ${from}.`);
}

/** A sentence that can be seen: fields keep what is wrong with them for a screen reader as well. */
function told(page: Page, words: string) {
  return page.getByText(words).and(page.locator(':visible')).first();
}

async function type(page: Page, label: string, text: string): Promise<void> {
  const field = page.getByLabel(label, { exact: true });
  await field.fill(text);
  await field.press('Tab');
}

const looks = [
  ['light', desk],
  ['dark', desk],
  ['light', { width: 1024, height: 768 }],
  ['light', phone],
  ['dark', phone],
] as const;

describe('the stackup screen', () => {
  it.each(looks)('in the %s theme, %j, opens without a complaint or a barrier', async (scheme, size) => {
    const tab = await atStackup('Layout engineer', 'Heron line card', size, scheme);
    await figure(tab.page, 'Impedance').waitFor();
    await tab.page.getByRole('button', { name: /^Layer 3, / }).click();
    await tab.page.getByRole('table', { name: 'Sensitivities of the impedance' }).waitFor();
    expect(await tab.barriers()).toEqual([]);
    expect(await tab.page.evaluate('document.documentElement.scrollWidth <= window.innerWidth')).toBe(true);
    expect(tab.complaints).toEqual([]);
    await tab.close();
  });

  it('is read only for a project manager, who still solves sections', async () => {
    const tab = await atStackup('Project manager');
    await figure(tab.page, 'Impedance').waitFor();
    expect(await tab.page.getByLabel('Dk of Core 2-3', { exact: true }).isDisabled()).toBe(true);
    expect(await tab.page.getByRole('button', { name: 'Add Dielectric' }).count()).toBe(0);
    const before = await ohmOf(tab.page, 'Impedance');
    await type(tab.page, 'Width at the foot', '9 mil');
    expect(await changed(tab.page, 'Impedance', before)).toBeLessThan(before);
    await tab.close();
  });
});

describe('a layout engineer at the stackup', () => {
  it('types a thickness with its unit, sees the impedance follow, and takes it back', async () => {
    const tab = await atStackup('Layout engineer');
    const { page } = tab;
    await page.getByLabel('Layer', { exact: true }).selectOption('L3');
    await page.locator('figcaption', { hasText: 'Strip line' }).waitFor();
    const before = await ohmOf(page, 'Impedance');
    await type(page, 'Thickness of Core 2-3', '7 mil');
    const after = await changed(page, 'Impedance', before);
    expect(after).toBeGreaterThan(before);
    expect(await page.getByLabel('Thickness of Core 2-3', { exact: true }).inputValue()).toBe('7 mil');
    await page.keyboard.press('Control+z');
    expect(await changed(page, 'Impedance', after)).toBe(before);
    await type(page, 'Df of Core 2-3', '0');
    await told(page, 'The wideband Debye model is causal').waitFor();
    await tab.close();
  });

  it('finds the width of a pair, uses it, and works with the keyboard alone', async () => {
    const tab = await atStackup('Layout engineer');
    const { page } = tab;
    await page.getByLabel('Layer', { exact: true }).selectOption('L6');
    await page.getByLabel('Form', { exact: true }).selectOption('pair');
    await figure(page, 'Differential').waitFor();
    await type(page, 'Differential impedance', '95 ohm');
    await page.getByRole('button', { name: 'Find the width' }).press('Enter');
    await page.getByText('gives 95.00 ohm').waitFor();
    await page.getByRole('button', { name: 'Use it' }).press('Enter');
    await figure(page, 'Differential').getByText('95.0').waitFor();
    await page.getByRole('button', { name: /^Layer 1, / }).press('Alt+ArrowDown');
    await page.getByRole('button', { name: /^Layer 2, Mask top/ }).waitFor();
    await told(page, 'is solder mask inside the board').waitFor();
    await page.getByRole('button', { name: 'Undo' }).press('Enter');
    await page.getByRole('button', { name: /^Layer 1, Mask top/ }).waitFor();
    await type(page, 'Differential impedance', '900 ohm');
    await page.getByRole('button', { name: 'Find the width' }).press('Enter');
    await page.getByText(/No width from .* gives 900 ohm/).waitFor();
    await tab.close();
  });

  it('saves a version, which a new revision starts with', async () => {
    const tab = await atStackup('Layout engineer');
    const { page } = tab;
    await type(page, 'Dk of PP 3-4', '3.44');
    await page.getByRole('link', { name: /^Save version/ }).click();
    await page.getByLabel('Kind', { exact: true }).selectOption('as-built');
    await page.getByRole('button', { name: 'Save the version' }).click();
    await page.getByText('Say why there is a new version.').waitFor();
    await page.getByLabel('Why').fill('Measured on the coupon of the first lot');
    expect(await tab.barriers()).toEqual([]);
    await page.getByRole('button', { name: 'Save the version' }).click();
    await page.getByText(/Version \d is saved/).waitFor();
    await page.getByRole('cell', { name: 'Measured on the coupon' }).waitFor();
    await page.getByRole('link', { name: 'Heron line card' }).click();
    await page.getByRole('link', { name: 'New revision' }).click();
    await page.getByRole('button', { name: 'Create the revision' }).click();
    await page.getByRole('link', { name: 'Revision C', exact: true }).click();
    await page.getByRole('link', { name: 'Stackup', exact: true }).click();
    await page.getByRole('cell', { name: /^Copied from revision B/ }).waitFor();
    expect(await page.getByLabel('Dk of PP 3-4', { exact: true }).inputValue()).toBe('3.44');
    await tab.close();
  });

  it('begins with assumed layers where there are none, and has the channels use them', async () => {
    const tab = await atStackup('Layout engineer', 'Petrel backplane');
    const { page } = tab;
    await page.getByText('This revision has no stackup yet').waitFor();
    expect(await tab.barriers()).toEqual([]);
    await page.getByRole('button', { name: /^Eight layers/ }).click();
    await page.reload();
    await page.getByText('are back from this browser').waitFor();
    await page.getByRole('link', { name: 'Save version 1' }).click();
    await page.getByLabel('Why').fill('To start from');
    await page.getByRole('button', { name: 'Save the version' }).click();
    await page.getByText('Version 1 is saved').waitFor();
    await page.getByRole('link', { name: 'Use version 1 in the channels' }).click();
    await page.getByRole('button', { name: 'Use it' }).click();
    await page.getByText('2 channels took version 1').waitFor();
    expect(tab.complaints).toEqual([]);
    await tab.close();
  });
});

describe('two people at one stackup', () => {
  it('are told of each other, and nothing of either is lost', async () => {
    const one = await atStackup('Layout engineer', 'Heron line card', desk, 'light', 0);
    const two = await atStackup('SI reviewer');
    await type(one.page, 'Dk of Core 4-5', '3.7');
    await type(two.page, 'Dk of Core 4-5', '3.8');
    await two.page.getByRole('link', { name: /^Save version/ }).click();
    await two.page.getByLabel('Why').fill('From the fabricator');
    await two.page.getByRole('button', { name: 'Save the version' }).click();
    await two.page.getByText(/Version \d is saved/).waitFor();
    await one.page.getByText('in the meantime').waitFor();
    await one.page.getByText('Core 4-5, Dk: 3.8, now 3.7.').waitFor();
    await one.page.getByRole('button', { name: /^Go on with mine/ }).click();
    await one.page.getByRole('link', { name: /^Save version/ }).click();
    await one.page.getByLabel('Why').fill('As measured');
    await one.page.getByRole('button', { name: 'Save the version' }).click();
    await one.page.getByText(/Version \d is saved/).waitFor();
    await one.page.getByRole('cell', { name: 'From the fabricator' }).waitFor();
    await one.page.getByRole('cell', { name: 'As measured' }).waitFor();
    await one.close();
    await two.close();
  });
});
