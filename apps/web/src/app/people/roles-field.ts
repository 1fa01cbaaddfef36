import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import type { FormControl } from '@angular/forms';
import { roles, roleTitles, type Role } from '@tollgate/contracts';
import { map, startWith, switchMap } from 'rxjs';
import { controlMessage } from '../forms/control-message';

const duties: Readonly<Record<Role, string>> = {
  'layout-engineer': 'describes channels, uploads parts, makes boards',
  'si-reviewer': 'judges models, assumptions and margins',
  'project-manager': 'makes boards and revisions, sees what blocks a release',
  librarian: 'keeps materials, part models and masks',
  administrator: 'people and audit; boards only as a member',
};

/** Which roles a person holds: one box each, with what the role is for. */
@Component({
  selector: 'tg-roles-field',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './roles-field.html',
  styleUrl: './roles-field.scss',
})
export class RolesField {
  readonly control = input.required<FormControl<Role[]>>();

  protected readonly roles = roles;
  protected readonly titles = roleTitles;
  protected readonly duties = duties;
  protected readonly message = controlMessage(this.control);
  private readonly event = toSignal(
    toObservable(this.control).pipe(
      switchMap((control) =>
        control.events.pipe(
          startWith(undefined),
          map(() => ({ touched: control.touched, held: control.value })),
        ),
      ),
    ),
  );

  protected held(role: Role): boolean {
    return (this.event()?.held ?? this.control().value).includes(role);
  }

  protected showsError(): boolean {
    return (this.event()?.touched ?? false) && this.message() !== '';
  }

  protected toggle(role: Role, on: boolean): void {
    const control = this.control();
    control.setValue(roles.filter((each) => (each === role ? on : control.value.includes(each))));
    control.markAsDirty();
    control.markAsTouched();
  }
}
