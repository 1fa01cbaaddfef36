import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { ReactiveFormsModule, type FormControl } from '@angular/forms';
import { MatError, MatFormField, MatHint, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { controlMessage } from './control-message';

/** A labelled field for a line of text, or several: label, hint and error sentence tied to the input. */
@Component({
  selector: 'tg-text-field',
  imports: [MatError, MatFormField, MatHint, MatInput, MatLabel, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './text-field.html',
  styleUrl: './field.scss',
})
export class TextField {
  readonly label = input.required<string>();
  readonly control = input.required<FormControl<string>>();
  readonly type = input<'text' | 'email' | 'password' | 'date' | 'search'>('text');
  readonly hint = input('');
  readonly autocomplete = input('off');
  /** More than one makes it a text area. */
  readonly rows = input(1);

  protected readonly message = controlMessage(this.control);
}
