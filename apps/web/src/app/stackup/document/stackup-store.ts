import { computed, inject, Injectable, signal } from '@angular/core';
import {
  parseStackup,
  stackupCautions,
  stackupProblems,
  type CompleteStackup,
  type FieldProblem,
  type Layer,
  type StackupVersion,
  type StackupVersions,
} from '@tollgate/contracts';
import { patched, withStep, type Step } from '../../channel/document/undo-list';
import { isSame } from '../../channel/saving/same';
import { Toasts } from '../../states/toasts';
import { StackupDrafts } from './stackup-drafts';
import { rowsOf, stackupOf, type StackupRows } from './stackup-rows';

/** The stackup that is edited, the version it was made from, what is selected, and the way back. One a screen. */
@Injectable()
export class StackupStore {
  private readonly drafts = inject(StackupDrafts);
  private readonly toasts = inject(Toasts);
  private readonly edited = signal<StackupRows | undefined>(undefined);
  private readonly past = signal<readonly Step[]>([]);
  private readonly future = signal<readonly Step[]>([]);
  private readonly chosen = signal<string | undefined>(undefined);
  private readonly told = signal<readonly FieldProblem[]>([]);

  readonly revisionId = signal('');
  readonly versions = signal<StackupVersions | undefined>(undefined);
  /** The newest version; what is saved is saved over it. Undefined while the revision has none. */
  readonly base = signal<StackupVersion | undefined>(undefined);
  /** A version someone else saved over the same one while there were edits here. */
  readonly overtaking = signal<StackupVersion | undefined>(undefined);
  /** When the edits that were found in this browser were made. */
  readonly recoveredAt = signal('');

  readonly rows = this.edited.asReadonly();
  readonly stackup = computed<CompleteStackup | undefined>(() => {
    const rows = this.edited();
    return rows && stackupOf(rows);
  });
  readonly mayChange = computed(() => this.versions()?.can.change ?? false);
  readonly canUndo = computed(() => this.past().length > 0);
  readonly canRedo = computed(() => this.future().length > 0);
  readonly dirty = computed(() => {
    const stackup = this.stackup();
    return stackup !== undefined && !isSame(stackup, this.base()?.document);
  });
  /** What keeps the stackup from being saved: of its shape, else of its sense; and what the server said last. */
  readonly problems = computed<readonly FieldProblem[]>(() => {
    const stackup = this.stackup();
    if (!stackup) return [];
    const parsed = parseStackup(stackup);
    const found = parsed.ok ? stackupProblems(parsed.stackup) : parsed.problems;
    return [...found, ...this.told()];
  });
  readonly cautions = computed(() => stackupCautions(this.stackup() ?? {}));

  readonly selectedKey = computed(() => {
    const rows = this.edited()?.rows ?? [];
    return rows.some(({ key }) => key === this.chosen()) ? this.chosen() : undefined;
  });
  readonly signalLayers = computed(() =>
    (this.stackup()?.layers ?? []).flatMap((layer: Layer) =>
      layer.kind === 'copper' && layer.role === 'signal' ? [layer.name] : [],
    ),
  );

  /** Shows a version, or nothing where there is none yet; edits this browser kept come back. */
  open(revisionId: string, base: StackupVersion | undefined): void {
    this.revisionId.set(revisionId);
    this.base.set(base);
    this.overtaking.set(undefined);
    this.recoveredAt.set('');
    this.edited.set(base && rowsOf(base.document));
    this.past.set([]);
    this.future.set([]);
    this.told.set([]);
    const draft = this.mayChange() ? this.drafts.find(revisionId) : undefined;
    if (!draft || isSame(draft.stackup, base?.document)) return;
    if (base) this.edit(() => rowsOf(draft.stackup));
    else this.edited.set(rowsOf(draft.stackup));
    this.recoveredAt.set(draft.at);
  }

  /** The edits became a version, or were given up for one. */
  settle(version: StackupVersion): void {
    this.drafts.forget(this.revisionId());
    this.base.set(version);
    this.overtaking.set(undefined);
    this.recoveredAt.set('');
    this.told.set([]);
    if (!isSame(this.stackup(), version.document)) {
      this.edited.set(rowsOf(version.document));
      this.past.set([]);
      this.future.set([]);
    }
  }

  /** Begins where there is nothing yet, or puts another stackup in place of the one that is edited. */
  put(stackup: CompleteStackup): void {
    if (this.edited()) this.edit(() => rowsOf(stackup));
    else {
      this.edited.set(rowsOf(stackup));
      this.keep();
    }
  }

  select(key: string | undefined): void {
    this.chosen.set(key);
  }

  /** Changes the stackup. Edits of the same `key` in quick succession are one step back. */
  edit(change: (stackup: StackupRows) => StackupRows, key = ''): void {
    const before = this.edited();
    if (!before || !this.mayChange()) return;
    const after = change(before);
    if (after === before) return;
    this.past.update((steps) => withStep(steps, before, after, key, Date.now()));
    this.future.set([]);
    this.edited.set(after);
    this.told.set([]);
    this.keep();
  }

  undo(): void {
    this.walk(this.past, this.future, 'back');
  }

  redo(): void {
    this.walk(this.future, this.past, 'forth');
  }

  /** What the server refused, with paths as in the stackup. */
  refused(problems: readonly FieldProblem[]): void {
    this.told.set(
      problems.map((each) => ({ ...each, path: each.path.replace(/^(document|stackup)\.?/, '') })),
    );
  }

  /** The sentence for one place of the stackup. */
  problemAt(path: string): string {
    const found = this.problems().find((problem) => problem.path === path);
    return found ? [found.message, found.mend].filter(Boolean).join(' ') : '';
  }

  private walk(from: typeof this.past, to: typeof this.past, direction: 'back' | 'forth'): void {
    const document = this.edited();
    const step = from().at(-1);
    if (!document || !step || !this.mayChange()) return;
    from.update((steps) => steps.slice(0, -1));
    const walked = patched(document, step[direction]);
    if (!walked) {
      this.toasts.failure('This step no longer fits the stackup and was dropped.');
      return;
    }
    to.update((steps) => [...steps, { ...step, key: '' }]);
    this.edited.set(walked);
    this.told.set([]);
    this.keep();
  }

  private keep(): void {
    const stackup = this.stackup();
    if (!stackup) return;
    if (this.dirty())
      this.drafts.keep(this.revisionId(), {
        number: this.base()?.number ?? 0,
        stackup,
        at: new Date().toISOString(),
      });
    else this.drafts.forget(this.revisionId());
  }
}
