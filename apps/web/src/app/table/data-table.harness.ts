import { ComponentHarness, HarnessPredicate } from '@angular/cdk/testing';

/** A data table as a person uses it: heads to sort by, a filter, rows of cells. */
export class DataTableHarness extends ComponentHarness {
  static readonly hostSelector = 'tg-data-table';

  private readonly filterInput = this.locatorForOptional('input[type=search]');

  static withCaption(caption: string): HarnessPredicate<DataTableHarness> {
    return new HarnessPredicate(DataTableHarness, {}).addOption('caption', caption, async (table, wanted) =>
      HarnessPredicate.stringMatches(await table.caption(), wanted),
    );
  }

  async caption(): Promise<string> {
    return (await this.locatorFor('caption')()).text();
  }

  async heads(): Promise<string[]> {
    return this.texts('thead th');
  }

  /** Text of every cell, row by row; heads of groups left out. */
  async rows(): Promise<string[][]> {
    const rows = await this.locatorForAll('tbody tr:not(.group)')();
    const cells = await this.texts('tbody td');
    const width = rows.length === 0 ? 1 : cells.length / rows.length;
    return rows.map((_row, index) => cells.slice(index * width, (index + 1) * width));
  }

  async groups(): Promise<string[]> {
    return this.texts('tr.group th');
  }

  async sortBy(title: string): Promise<void> {
    for (const button of await this.locatorForAll('thead th button')()) {
      if ((await button.text()) === title) return button.click();
    }
    throw new Error(`There is no column "${title}" to sort by.`);
  }

  /** Sorted columns as they are told to a screen reader: ["Name ascending"]. */
  async sorted(): Promise<string[]> {
    const heads = await this.locatorForAll('thead th[aria-sort]')();
    return Promise.all(
      heads.map(async (head) => `${await head.text()} ${(await head.getAttribute('aria-sort')) ?? ''}`),
    );
  }

  async filter(text: string): Promise<void> {
    const input = await this.filterInput();
    if (!input) throw new Error('This table has no filter.');
    await input.setInputValue(text);
    await input.dispatchEvent('input');
  }

  /** Text of the loading, empty or failure state, or empty. */
  async state(): Promise<string> {
    const state = await this.locatorForOptional('tg-loading', 'tg-empty', 'tg-failure')();
    return (await state?.text()) ?? '';
  }

  private async texts(selector: string): Promise<string[]> {
    const found = await this.locatorForAll(selector)();
    return Promise.all(found.map((each) => each.text()));
  }
}
