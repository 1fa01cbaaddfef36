import { ComponentHarness } from '@angular/cdk/testing';
import { roles, roleTitles } from '@tollgate/contracts';

/** The boxes of a person's roles. */
export class RolesFieldHarness extends ComponentHarness {
  static readonly hostSelector = 'tg-roles-field';

  private readonly boxes = this.locatorForAll('input');

  async held(): Promise<string[]> {
    const checked = await Promise.all((await this.boxes()).map((box) => box.getProperty<boolean>('checked')));
    return roles.filter((_role, index) => checked[index]).map((role) => roleTitles[role]);
  }

  async toggle(title: string): Promise<void> {
    const index = roles.findIndex((role) => roleTitles[role] === title);
    await (await this.boxes())[index]!.click();
  }

  async error(): Promise<string> {
    return (await this.locatorFor('p')()).text();
  }
}
