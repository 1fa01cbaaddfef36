import { ComponentHarness } from '@angular/cdk/testing';

/** The frame of the product: where one can go, and what it says of itself. */
export class ShellHarness extends ComponentHarness {
  static readonly hostSelector = 'tg-shell';

  async places(): Promise<string[]> {
    const links = await this.locatorForAll('nav.places a')();
    return Promise.all(links.map((link) => link.text()));
  }

  async isDemonstration(): Promise<boolean> {
    return (await this.locatorForOptional('.demonstration')()) !== null;
  }

  async saysServerIsAway(): Promise<boolean> {
    return (await this.locatorForOptional('.away')()) !== null;
  }

  /** Takes the skip link, and says which element then has the focus. */
  async skip(): Promise<boolean> {
    await (await this.locatorFor('.skip')()).click();
    return (await this.locatorFor('main')()).isFocused();
  }
}
