import { computed, inject, Injectable, signal } from '@angular/core';
import type { Channel, CompleteChannel, FieldProblem } from '@tollgate/contracts';
import { Toasts } from '../../states/toasts';
import { patched, withStep, type Step } from './undo-list';

export type SaveReason = 'edit' | 'undo' | 'redo' | 'merge';

/** The document that is being edited: what it holds, what is selected in it, and the way back. One a screen. */
@Injectable()
export class ChannelStore {
  private readonly toasts = inject(Toasts);
  private readonly stored = signal<Channel | undefined>(undefined);
  private readonly edited = signal<CompleteChannel | undefined>(undefined);
  private readonly past = signal<readonly Step[]>([]);
  private readonly future = signal<readonly Step[]>([]);
  private readonly chosen = signal<string | undefined>(undefined);

  /** As the server has it. */
  readonly channel = this.stored.asReadonly();
  readonly document = this.edited.asReadonly();
  readonly mayChange = computed(() => this.stored()?.can.change ?? false);
  readonly canUndo = computed(() => this.past().length > 0);
  readonly canRedo = computed(() => this.future().length > 0);
  /** Why the last change came about; goes with the next save. */
  readonly reason = signal<SaveReason>('edit');
  readonly hoveredId = signal<string | undefined>(undefined);
  /** What the last check found wrong, by path in the document. */
  readonly problems = signal<readonly FieldProblem[]>([]);

  readonly selectedId = computed(() => {
    const elements = this.document()?.elements ?? [];
    return elements.find((element) => element.id === this.chosen())?.id ?? elements[0]?.id;
  });
  readonly selected = computed(() =>
    this.document()?.elements.find((element) => element.id === this.selectedId()),
  );
  readonly selectedIndex = computed(
    () => this.document()?.elements.findIndex((element) => element.id === this.selectedId()) ?? -1,
  );

  open(channel: Channel): void {
    const another = this.stored()?.id !== channel.id;
    this.stored.set(channel);
    this.edited.set(channel.document);
    this.problems.set(channel.checkProblems);
    if (!another) return;
    this.past.set([]);
    this.future.set([]);
    this.chosen.set(undefined);
  }

  /** What was saved, or what another person saved, is the ground from now on; the edits stay. */
  acknowledge(channel: Channel): void {
    this.stored.set(channel);
  }

  select(id: string | undefined): void {
    this.chosen.set(id);
  }

  /** Changes the document. Edits of the same `key` in quick succession are one step back. */
  edit(change: (document: CompleteChannel) => CompleteChannel, key = ''): void {
    const before = this.edited();
    if (!before || !this.mayChange()) return;
    const after = change(before);
    if (after === before) return;
    this.past.update((steps) => withStep(steps, before, after, key, Date.now()));
    this.future.set([]);
    this.put(after, 'edit');
  }

  /** A merge is no step of one's own: it is not undone, and steps that no longer fit are dropped when met. */
  merged(document: CompleteChannel): void {
    this.put(document, 'merge');
  }

  undo(): void {
    this.walk('undo');
  }

  redo(): void {
    this.walk('redo');
  }

  /** The sentence of the last check for one place of the document. */
  problemAt(path: string): string {
    const found = this.problems().find((problem) => problem.path.replace(/^document\.?/, '') === path);
    return found ? [found.message, found.mend].filter(Boolean).join(' ') : '';
  }

  private walk(direction: 'undo' | 'redo'): void {
    const [from, to] = direction === 'undo' ? [this.past, this.future] : [this.future, this.past];
    const document = this.edited();
    const step = from().at(-1);
    if (!document || !step || !this.mayChange()) return;
    from.update((steps) => steps.slice(0, -1));
    const walked = patched(document, direction === 'undo' ? step.back : step.forth);
    if (!walked) {
      this.toasts.failure(
        `One step could not be ${direction === 'undo' ? 'undone' : 'redone'}: what it changed has been changed by another person since.`,
      );
      return;
    }
    to.update((steps) => [...steps, { ...step, key: '' }]);
    this.put(walked, direction);
  }

  private put(document: CompleteChannel, reason: SaveReason): void {
    this.reason.set(reason);
    this.edited.set(document);
  }
}
