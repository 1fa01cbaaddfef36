import { ComponentHarness, TestKey } from '@angular/cdk/testing';

const keys = { ArrowDown: TestKey.DOWN_ARROW, ArrowUp: TestKey.UP_ARROW } as const;

/** The list of elements as a person meets it. */
export class ElementListHarness extends ComponentHarness {
  static readonly hostSelector = 'tg-element-list';

  async ids(): Promise<string[]> {
    const items = await this.locatorForAll('[data-element]')();
    return Promise.all(items.map(async (item) => (await item.getAttribute('data-element')) ?? ''));
  }

  async textOf(id: string): Promise<string> {
    return (await this.row(id)).text();
  }

  async press(id: string): Promise<void> {
    await (await this.row(id)).click();
  }

  async key(id: string, key: keyof typeof keys, alt = false): Promise<void> {
    await (await this.row(id)).sendKeys({ alt }, keys[key]);
  }

  async tool(name: string): Promise<void> {
    await (await this.locatorFor(`button[aria-label="${name}"]`)()).click();
  }

  async tools(): Promise<string[]> {
    const buttons = await this.locatorForAll('.tools button, tg-element-tray button')();
    return Promise.all(buttons.map((button) => button.text()));
  }

  private async row(id: string) {
    return this.locatorFor(`[data-element="${id}"] .row`)();
  }
}
