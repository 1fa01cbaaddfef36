import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { ReactiveFormsModule, type FormControl } from '@angular/forms';
import { MatError, MatFormField, MatHint, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { controlMessage } from './control-message';

export interface Choice {
  readonly value: string;
  readonly title: string;
}

/** A labelled choice of one from a list, by the browser's own select: it works the same on a desk and on a phone. */
@Component({
  selector: 'tg-choice-field',
  imports: [MatError, MatFormField, MatHint, MatInput, MatLabel, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './choice-field.html',
  styleUrl: './field.scss',
})
export class ChoiceField {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<string>>();
  readonly choices = input.required<readonly Choice[]>();
  readonly hint = input('');
  /** Words of the empty choice; left out, there is none. */
  readonly none = input('');

  protected readonly message = controlMessage(this.control);
}
