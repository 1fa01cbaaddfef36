import AxeBuilder from '@axe-core/playwright';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import type { SignIn } from './product';

const flags = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--disable-dev-shm-usage',
];

export const desk = { width: 1440, height: 900 };
export const phone = { width: 390, height: 844 };

export function launch(): Promise<Browser> {
  return chromium.launch({ executablePath: '/usr/bin/chromium', args: flags });
}

/** A tab of its own person: what it complains of in the console is kept, and no request leaves this machine. */
export class Tab {
  readonly complaints: string[] = [];

  private constructor(
    readonly context: BrowserContext,
    readonly page: Page,
    readonly address: string,
  ) {}

  static async open(
    browser: Browser,
    address: string,
    size = desk,
    colorScheme: 'light' | 'dark' = 'light',
  ): Promise<Tab> {
    const context = await browser.newContext({ viewport: size, colorScheme, acceptDownloads: true });
    await context.route(
      (url) => url.hostname !== '127.0.0.1',
      (route) => route.abort(),
    );
    const page = await context.newPage();
    const tab = new Tab(context, page, address);
    page.on('console', (message) => {
      if (message.type() === 'error') tab.complaints.push(message.text());
    });
    page.on('pageerror', (error) => tab.complaints.push(error.message));
    return tab;
  }

  async goto(path: string): Promise<void> {
    await this.page.goto(`${this.address}${path}`);
  }

  async signIn(person: Pick<SignIn, 'email' | 'password'>): Promise<void> {
    await this.goto('/sign-in');
    await this.page.getByLabel(/mail/i).first().fill(person.email);
    await this.page.getByLabel('Password', { exact: true }).fill(person.password);
    await this.page.keyboard.press('Enter');
  }

  /** Findings of axe that are serious or worse, as short lines. */
  async barriers(): Promise<string[]> {
    const { violations } = await new AxeBuilder({ page: this.page }).analyze();
    return violations
      .filter((each) => each.impact === 'serious' || each.impact === 'critical')
      .map((each) => `${each.id}: ${each.nodes.map((node) => node.target.join(' ')).join(', ')}`);
  }

  async close(): Promise<void> {
    await this.context.close();
  }
}
