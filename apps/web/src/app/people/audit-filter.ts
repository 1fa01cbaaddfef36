import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { FormControl } from '@angular/forms';
import { ActivatedRoute, Router } from '@angular/router';
import type { Person } from '@tollgate/contracts';
import { debounceTime, merge } from 'rxjs';
import { ChoiceField, type Choice } from '../forms/choice-field';
import { TextField } from '../forms/text-field';

const typingMs = 300;

/** Narrows the audit trail by kind of event and by person; the choice stands in the address. */
@Component({
  selector: 'tg-audit-filter',
  imports: [ChoiceField, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tg-text-field label="Kind" hint="Or its beginning, such as board." [control]="kind" />
    <tg-choice-field label="Who" none="everybody" [choices]="choices()" [control]="person" />
  `,
  styles: `
    :host {
      display: grid;
      grid-template-columns: repeat(auto-fill, minmax(220px, 280px));
      gap: var(--tg-space-4);
    }
  `,
})
export class AuditFilter {
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);

  readonly what = input.required<string>();
  readonly who = input.required<string>();
  readonly people = input.required<readonly Person[]>();

  protected readonly kind = new FormControl('', { nonNullable: true });
  protected readonly person = new FormControl('', { nonNullable: true });
  protected readonly choices = computed<readonly Choice[]>(() =>
    this.people().map((person) => ({ value: person.id, title: person.name })),
  );

  constructor() {
    effect(() => {
      // The person's choice takes hold once its option is there.
      this.choices();
      this.kind.setValue(this.what(), { emitEvent: false });
      this.person.setValue(this.who(), { emitEvent: false });
    });
    merge(this.kind.valueChanges, this.person.valueChanges)
      .pipe(debounceTime(typingMs), takeUntilDestroyed())
      .subscribe(() => this.choose());
  }

  private choose(): void {
    void this.router.navigate([], {
      relativeTo: this.route,
      queryParams: {
        what: this.kind.value.trim() || null,
        who: this.person.value || null,
        before: null,
      },
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }
}
