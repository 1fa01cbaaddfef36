import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import type { Browser } from 'playwright-core';
import { launch, Tab } from '../support/browser';
import { lossyPart } from '../support/fixtures';
import { Product } from '../support/product';

/** Measured files beside the repository, or ones of the same ports and band written here where it stands alone. */
const measured = join(process.env['TOLLGATE_REFERENCE'] ?? resolve('../shared/reference'), 'touchstone');
const folder = mkdtempSync(join(tmpdir(), 'tg-measured-'));

let product: Product;
let browser: Browser;
let tab: Tab;

beforeAll(async () => {
  product = await Product.start();
  browser = await launch();
  tab = await Tab.open(browser, product.address);
  await tab.signIn(product.signIn('Layout engineer'));
  await tab.page.waitForURL('**/boards');
}, 300_000);

afterAll(async () => {
  await browser?.close();
  await product?.stop();
  rmSync(folder, { recursive: true, force: true });
});

function bring(name: string, ports: 2 | 4, fromGhz: number, toGhz: number): string {
  const path = join(folder, name);
  const given = join(measured, name);
  writeFileSync(path, existsSync(given) ? readFileSync(given) : lossyPart(ports, fromGhz, toGhz));
  return path;
}

/** A new channel that is the measured part and nothing else. */
async function channelOf(name: string, signaling: string, path: string): Promise<void> {
  const { page } = tab;
  await tab.goto('/boards');
  await page.getByRole('link', { name: 'Revision B' }).first().click();
  await page.getByRole('link', { name: 'New channel' }).click();
  await page.getByRole('dialog').getByLabel('Name').fill(name);
  await page.getByRole('dialog').getByLabel('Signaling').selectOption(signaling);
  await page.getByRole('button', { name: 'Create the channel' }).click();
  await page.waitForURL('**/channels/**');
  await page.getByRole('button', { name: 'Add an element' }).click();
  await page.locator('[data-kind="touchstone"]').click();
  await page.locator('[data-element="M1"] button.row').click();
  await page.locator('[data-upload]').setInputFiles(path);
  // No toll stands there where the part ends below the evaluation frequency; its standing does.
  await page.locator('[data-element="M1"] .standing', { hasText: 'assumed' }).waitFor();
  await page.locator('[data-element="L1"] button.row').click();
  await page.getByRole('button', { name: 'Remove L1' }).click();
  await page.locator('[data-element="L1"]').waitFor({ state: 'detached' });
  await page.getByRole('link', { name: 'Limits', exact: true }).click();
}

async function takeSet(key: string): Promise<void> {
  const before = await tab.page.locator('[data-limit]').count();
  await tab.page.getByRole('button', { name: 'From a mask set' }).click();
  await tab.page.locator(`[data-set="${key}"]`).check();
  await tab.page.getByRole('button', { name: 'Take this limit' }).click();
  await tab.page.locator('[data-limit]').nth(before).waitFor();
}

describe('a measured part, uploaded in the browser,', () => {
  it('cable1_rx_pair.s4p is judged against 93.9.2 and 83E.1', async () => {
    await channelOf('Cable pair', 'differential', bring('cable1_rx_pair.s4p', 4, 0.01, 40));
    await takeSet('93-KR4-IL');
    await takeSet('83E-C2M-IL');
    const words = await tab.page.locator('[data-limit] tg-verdict').allInnerTexts();
    expect(words).toHaveLength(2);
    for (const word of words) expect(word).toMatch(/^(Holds|Exceeds), informative limit, \d+\.\d\d dB/);
  });

  it('pcb_stripline_119mm.s2p is judged against a limit of the team', async () => {
    await channelOf('Stripline', 'single-ended', bring('pcb_stripline_119mm.s2p', 2, 0.01, 20));
    await tab.page.getByRole('button', { name: 'Own limit' }).click();
    await tab.page.locator('[data-path="form"]').selectOption('segments');
    await tab.page.locator('[data-path="segments[0].formula"]').fill('1 + 1.6*sqrt(f)');
    await tab.page.locator('[data-path="segments[0].fromHz"]').fill('100 MHz');
    await tab.page.locator('[data-path="segments[0].toHz"]').fill('8 GHz');
    await tab.page.keyboard.press('Tab');
    const verdict = tab.page.locator('[data-limit] tg-verdict', {
      hasText: /Holds, own limit, \d+\.\d\d dB left/,
    });
    await verdict.waitFor();
  });

  it('msl100.s2p against 93.9.2 is not judged, and the gap from 10 to 25.78 GHz is named', async () => {
    await channelOf('Microstrip', 'single-ended', bring('msl100.s2p', 2, 0.001, 10));
    await takeSet('93-KR4-IL');
    const limit = tab.page.locator('[data-limit]').first();
    expect(await limit.locator('tg-verdict').innerText()).toContain('Not judged');
    expect(await limit.innerText()).toMatch(/10 GHz to 25\.78/);
    // A part without its file is refused until the upload: the network lines of that are all the console says.
    expect(tab.complaints.filter((line) => !line.includes('422'))).toEqual([]);
  });
});
