import { ComponentHarness } from '@angular/cdk/testing';
import { MatFormFieldHarness } from '@angular/material/form-field/testing';
import { MatInputHarness } from '@angular/material/input/testing';

/** A text field as a person meets it: label, value, hint, the sentence of its error. */
export class TextFieldHarness extends ComponentHarness {
  static readonly hostSelector = 'tg-text-field';

  private readonly field = this.locatorFor(MatFormFieldHarness);
  private readonly input = this.locatorFor(MatInputHarness);

  async label(): Promise<string | null> {
    return (await this.field()).getLabel();
  }

  async errors(): Promise<string[]> {
    return (await this.field()).getTextErrors();
  }

  async type(text: string): Promise<void> {
    await (await this.input()).setValue(text);
  }

  async value(): Promise<string> {
    return (await this.input()).getValue();
  }

  async leave(): Promise<void> {
    await (await this.input()).blur();
  }

  /** The error is tied to the input, so that it is read out with it. */
  async isDescribedByItsError(): Promise<boolean> {
    const host = await (await this.input()).host();
    const described = (await host.getAttribute('aria-describedby')) ?? '';
    const error = await this.locatorForOptional('mat-error')();
    const id = await error?.getAttribute('id');
    return id !== null && id !== undefined && described.split(' ').includes(id);
  }
}
