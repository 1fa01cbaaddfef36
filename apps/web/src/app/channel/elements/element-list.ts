import { CdkDrag, CdkDragHandle, CdkDropList, type CdkDragDrop } from '@angular/cdk/drag-drop';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  Injector,
  afterNextRender,
  ElementRef,
} from '@angular/core';
import type { ElementKind } from '@tollgate/contracts';
import { formatDb } from '@tollgate/quantities';
import { Glyph } from '../../marks/glyph';
import { CheckRunner } from '../document/check-runner';
import { ChannelStore } from '../document/channel-store';
import { withDuplicate, withMoved, withNewElement, withoutElement } from '../document/element-edits';
import { ElementTray } from './element-tray';
import { mainValues, nameOf } from './element-words';

/** The elements from near to far: select, add, move by hand or by Alt and an arrow, duplicate, remove. */
@Component({
  selector: 'tg-element-list',
  imports: [CdkDrag, CdkDragHandle, CdkDropList, ElementTray, Glyph],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './element-list.html',
  styleUrl: './element-list.scss',
})
export class ElementList {
  private readonly check = inject(CheckRunner);
  private readonly injector = inject(Injector);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  protected readonly store = inject(ChannelStore);

  protected readonly rows = computed(() => {
    const view = this.check.view();
    const tolls = new Map(view?.ledger[0]?.rows.map((row) => [row.element, row.tollDb]));
    const standings = new Map(view?.elementStandings.map((each) => [each.element, each]));
    return (this.store.document()?.elements ?? []).map((element, i) => ({
      id: element.id,
      name: nameOf(element),
      values: mainValues(element),
      standing: standings.get(element.id)?.standing ?? '',
      reason: standings.get(element.id)?.reason ?? '',
      toll: tolls.has(element.id) ? formatDb(tolls.get(element.id)!, false) : '',
      wrong: this.store.problems().some((problem) => problem.path.includes(`elements[${i}]`)),
    }));
  });

  protected add(kind: ElementKind): void {
    let added = '';
    this.store.edit((document) => {
      const result = withNewElement(document, kind, this.store.selectedId());
      added = result.id;
      return result.document;
    });
    this.choose(added);
  }

  protected duplicate(id: string): void {
    let added = '';
    this.store.edit((document) => {
      const result = withDuplicate(document, id);
      added = result.id;
      return result.document;
    });
    this.choose(added);
  }

  protected remove(id: string): void {
    const ids = this.rows().map((row) => row.id);
    const neighbour = ids[ids.indexOf(id) + 1] ?? ids[ids.indexOf(id) - 1];
    this.store.edit((document) => withoutElement(document, id));
    if (neighbour) this.choose(neighbour);
  }

  protected drop(event: CdkDragDrop<unknown>): void {
    const row = this.rows()[event.previousIndex];
    if (row) this.move(row.id, event.currentIndex);
  }

  protected key(event: KeyboardEvent, id: string, index: number): void {
    const step = event.key === 'ArrowDown' ? 1 : event.key === 'ArrowUp' ? -1 : 0;
    if (step !== 0) {
      event.preventDefault();
      if (event.altKey) {
        this.move(id, index + step);
        this.choose(id);
      } else {
        const next = this.rows()[index + step];
        if (next) this.choose(next.id);
      }
    } else if (event.key === 'Delete' && this.rows().length > 1) {
      event.preventDefault();
      this.remove(id);
    }
  }

  /** Selects and brings the keyboard along. */
  private choose(id: string): void {
    this.store.select(id);
    afterNextRender(
      () => {
        const button = this.host.nativeElement.querySelector<HTMLElement>(`[data-element="${id}"] .row`);
        button?.focus();
        button?.scrollIntoView?.({ block: 'nearest' });
      },
      { injector: this.injector },
    );
  }

  private move(id: string, to: number): void {
    this.store.edit((document) => withMoved(document, id, to));
  }
}
