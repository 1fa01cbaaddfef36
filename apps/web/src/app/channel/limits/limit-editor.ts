import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Dialogs } from '../../dialogs/dialogs';
import { Glyph } from '../../marks/glyph';
import { VerdictMark } from '../../marks/verdict-mark';
import { ChannelStore } from '../document/channel-store';
import { CheckRunner } from '../document/check-runner';
import { withLimit, type PlacedLimit } from '../document/element-edits';
import { LimitForm } from './limit-form';
import { limitsOfSet, ownLimit } from './limit-forms';
import { MaskSetDialog, type MaskSetDialogData, type MaskSetChoice } from './mask-set-dialog';

/** The limits of the channel: taken from mask sets or typed; one of them open. */
@Component({
  selector: 'tg-limit-editor',
  imports: [Glyph, LimitForm, MatButton, VerdictMark],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './limit-editor.html',
  styleUrl: './limit-editor.scss',
})
export class LimitEditor {
  private readonly check = inject(CheckRunner);
  private readonly dialogs = inject(Dialogs);
  protected readonly store = inject(ChannelStore);
  private readonly chosen = signal<string | undefined>(undefined);

  protected readonly limits = computed(() => this.store.document()?.limits ?? []);
  protected readonly open = computed(
    () => this.limits().find((limit) => limit.id === this.chosen()) ?? this.limits()[0],
  );
  protected readonly base = computed(
    () => `limits[${this.limits().findIndex((limit) => limit.id === this.open()?.id)}]`,
  );
  protected readonly verdicts = computed(
    () => new Map(this.check.view()?.limits.map((limit) => [limit.id, limit.verdict])),
  );

  protected choose(id: string): void {
    this.chosen.set(id);
  }

  protected addOwn(): void {
    this.store.edit((document) => {
      const limit = ownLimit(document);
      this.chosen.set(limit.id);
      return { ...document, limits: [...document.limits, limit] };
    });
  }

  protected addFromSet(): void {
    this.dialogs
      .open<MaskSetDialog, MaskSetDialogData, MaskSetChoice>(
        MaskSetDialog,
        { signaling: this.store.document()?.signaling ?? 'differential' },
        '760px',
      )
      .afterClosed()
      .subscribe((choice) => {
        if (!choice) return;
        this.store.edit((document) => {
          const added = limitsOfSet(choice.set, document).filter((_, i) => choice.chosen.has(i));
          this.chosen.set(added[0]?.id);
          return { ...document, limits: [...document.limits, ...added] };
        });
      });
  }

  protected change(limit: PlacedLimit, key: string): void {
    this.store.edit(
      (document) => withLimit(document, limit.id, limit),
      key === '' ? '' : `${limit.id} ${key}`,
    );
  }

  protected remove(id: string): void {
    this.store.edit((document) => ({
      ...document,
      limits: document.limits.filter((limit) => limit.id !== id),
    }));
  }
}
