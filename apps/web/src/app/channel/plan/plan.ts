import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  effect,
  ElementRef,
  inject,
  output,
  untracked,
  viewChild,
} from '@angular/core';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import { paths } from '../../paths';
import { Dialogs } from '../../dialogs/dialogs';
import { PlanBoard } from './board/plan-board';
import { Cursor } from './desk/cursor';
import { Pen } from './desk/pen';
import { Placing } from './desk/placing';
import { PlanDesk } from './desk/plan-desk';
import { PlanDrawing } from './drawing/plan-drawing';
import { PlanFoot } from './foot/plan-foot';
import { PlanGround } from './ground/plan-ground';
import { PlanRulers } from './ground/plan-rulers';
import { PlanHeld } from './held/plan-held';
import { PlanKeys } from './keys/plan-keys';
import { PlanShortcuts } from './keys/shortcuts';
import { PlanOutline } from './outline/plan-outline';
import { PlanPointer } from './pointer/plan-pointer';
import { PlanTray } from './tray/plan-tray';
import { PlanView } from './view/plan-view';

/** The floor plan: the channel on its board, drawn and changed by pointer or by keyboard. */
@Component({
  selector: 'tg-plan',
  imports: [PlanDrawing, PlanFoot, PlanGround, PlanHeld, PlanOutline, PlanRulers, PlanTray, RouterLink],
  providers: [Cursor, Pen, Placing, PlanBoard, PlanDesk, PlanKeys, PlanPointer, PlanView],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './plan.html',
  styleUrl: './plan.scss',
})
export class Plan {
  private readonly dialogs = inject(Dialogs);
  private readonly keys = inject(PlanKeys);
  private readonly pointer = inject(PlanPointer);
  private readonly route = inject(ActivatedRoute);
  private readonly router = inject(Router);
  private readonly stage = viewChild.required<ElementRef<HTMLElement>>('stage');
  private readonly outline = viewChild.required(PlanOutline);
  protected readonly board = inject(PlanBoard);
  protected readonly desk = inject(PlanDesk);
  protected readonly pen = inject(Pen);
  protected readonly placing = inject(Placing);
  protected readonly store = this.desk.store;
  protected readonly view = this.desk.view;

  /** Someone wants to edit the selected element's fields. */
  readonly edited = output<void>();

  protected readonly withoutLayers = computed(
    () => (this.store.document()?.stackup?.layers ?? []).length === 0 && !this.board.stackup(),
  );
  protected readonly stackupPage = computed(() => paths.stackup(this.store.channel()?.revisionId ?? ''));
  protected readonly carried = computed(() => {
    const at = this.placing.carried()?.at;
    return at && this.view.toPx(at);
  });
  private fitted = '';

  constructor() {
    const destroyed = inject(DestroyRef);
    const host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
    // Listened to natively: an Angular listener would have the whole screen looked over at each key and move.
    const key = (event: KeyboardEvent) => this.key(event);
    host.addEventListener('keydown', key);
    host.addEventListener('keyup', key);
    afterNextRender(() => {
      const stage = this.stage().nativeElement;
      destroyed.onDestroy(this.pointer.attach(stage));
      const resized = new ResizeObserver(() => this.view.size.set([stage.clientWidth, stage.clientHeight]));
      resized.observe(stage);
      destroyed.onDestroy(() => resized.disconnect());
      this.view.size.set([stage.clientWidth, stage.clientHeight]);
    });
    effect(() => {
      const id = this.store.channel()?.id ?? '';
      const [width] = this.view.size();
      if (!this.board.settled() || width === 0 || id === this.fitted) return;
      this.fitted = id;
      untracked(() => this.desk.fitAll());
    });
  }

  protected shortcuts(): void {
    this.dialogs.open(PlanShortcuts, undefined, '640px');
  }

  protected editOutline(): void {
    void this.router.navigate([], {
      relativeTo: this.route,
      queryParams: { dialog: 'outline' },
      queryParamsHandling: 'merge',
    });
  }

  private key(event: KeyboardEvent): void {
    const target = event.target instanceof Element ? event.target : undefined;
    if (!target || target.matches('input, select, textarea')) return;
    const onStage = target === this.stage().nativeElement;
    if (event.key === ' ' && onStage) {
      event.preventDefault();
      this.pointer.panning = event.type === 'keydown';
      return;
    }
    if (event.type === 'keyup') return;
    if (event.key === '?') {
      event.preventDefault();
      this.shortcuts();
      return;
    }
    if (event.key === 'Escape' && this.pointer.giveUp()) return;
    const inOutline = target.closest('[data-plan-keys]') !== null && !onStage;
    if (!onStage && !inOutline) return;
    if (event.key === 'Enter' && onStage && !this.pen.active()) {
      event.preventDefault();
      if (this.desk.grip()) this.edited.emit();
      else if (this.store.selectedId()) this.desk.select(this.store.selectedId()!);
      return;
    }
    if (!this.keys.take(event)) return;
    event.preventDefault();
    if (!inOutline) return;
    if (this.pen.active()) this.stage().nativeElement.focus();
    else queueMicrotask(() => setTimeout(() => this.outline().focus()));
  }
}
