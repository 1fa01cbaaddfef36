import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  output,
  signal,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { portOrders, type BoardFile, type ChannelElement, type FieldProblem } from '@tollgate/contracts';
import { formatQuantity } from '@tollgate/quantities';
import { apiProblemOf } from '../../api/api-problem';
import { ChannelStore } from '../document/channel-store';
import { PickEntry } from '../entries/pick-entry';
import { TextEntry } from '../entries/text-entry';
import { BoardFiles } from './board-files';
import type { FieldChange } from './element-quantities';
import { PortPicksFields } from './port-picks';
import { belowPicks, interpolationPicks, orderTitles, wavePicks } from './part-picks';

type Part = Extract<ChannelElement, { kind: 'touchstone' | 'connector' }>;

/** A part given by its Touchstone file: which file of the board, how its ports run, how it is read. */
@Component({
  selector: 'tg-part-fields',
  imports: [MatButton, PickEntry, PortPicksFields, TextEntry],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './part-fields.html',
  styleUrl: './part-fields.scss',
})
export class PartFields {
  private readonly boardFiles = inject(BoardFiles);
  protected readonly store = inject(ChannelStore);

  readonly element = input.required<Part>();
  readonly base = input.required<string>();
  readonly disabled = input(false);
  readonly changed = output<FieldChange>();
  readonly replaced = output<(element: ChannelElement) => ChannelElement>();

  protected readonly belowPicks = belowPicks;
  protected readonly interpolationPicks = interpolationPicks;
  protected readonly wavePicks = wavePicks;
  protected readonly progress = this.boardFiles.progress;
  protected readonly over = signal(false);
  protected readonly failure = signal<{ text: string; fields: readonly FieldProblem[] } | undefined>(
    undefined,
  );

  protected readonly byCircuit = computed(() => {
    const element = this.element();
    return element.kind === 'connector' && element.circuit !== undefined;
  });
  protected readonly makerReference = computed(() => {
    const element = this.element();
    return element.kind === 'connector' ? element.makerReference : undefined;
  });
  protected readonly filePicks = computed(() =>
    (this.boardFiles.files() ?? []).map((file) => ({ value: file.id, title: file.name })),
  );
  protected readonly file = computed(() =>
    this.boardFiles.files()?.find((file) => file.id === this.element().fileId),
  );
  protected readonly facts = computed(() => {
    const file = this.file();
    if (!file) return '';
    const hz = (value: number) => formatQuantity(value, 'frequency', { digits: 4 });
    return `${file.ports} ports, ${file.points} points, ${hz(file.fromHz)} to ${hz(file.toHz)}, ${references(file)}`;
  });
  protected readonly orderPicks = computed(() => {
    const likely = this.file()?.likelyPortOrder;
    return portOrders.map((value) => ({
      value,
      title: `${orderTitles[value]}${likely === value ? ' (likely)' : ''}`,
    }));
  });
  /** A choice of order stands for four ports; any other count is picked port by port. */
  protected readonly fourPorts = computed(() => this.file()?.ports === 4);
  protected readonly manyPorts = computed(() => (this.file()?.ports ?? 0) > 4);
  protected readonly unsure = computed(() => this.fourPorts() && this.file()?.likelyPortOrder === null);

  constructor() {
    effect(() => {
      const boardId = this.store.channel()?.boardId;
      if (boardId) this.boardFiles.read(boardId);
    });
  }

  protected set(name: string, value: unknown): void {
    this.changed.emit({ path: [name], value });
  }

  protected by(way: string | undefined): void {
    this.replaced.emit((element) => {
      if (element.kind !== 'connector') return element;
      const { circuit: _circuit, fileId: _fileId, portOrder: _order, ports: _ports, ...rest } = element;
      return way === 'circuit' ? { ...rest, circuit: [{ kind: 'series', inductanceH: 200e-12 }] } : rest;
    });
  }

  protected chooseFile(id: string | undefined): void {
    const file = this.boardFiles.files()?.find((each) => each.id === id);
    this.replaced.emit((element) => withFile(element as Part, file));
  }

  protected picked(event: Event): void {
    const field = event.target as HTMLInputElement;
    const file = field.files?.[0];
    field.value = '';
    if (file) this.upload(file);
  }

  protected dropped(event: DragEvent): void {
    event.preventDefault();
    this.over.set(false);
    const file = event.dataTransfer?.files[0];
    if (file && !this.disabled()) this.upload(file);
  }

  protected dragged(event: DragEvent): void {
    event.preventDefault();
    this.over.set(true);
  }

  protected problemAt(name: string): string {
    return this.store.problemAt(`${this.base()}.${name}`);
  }

  private upload(file: File): void {
    const boardId = this.store.channel()?.boardId;
    if (!boardId) return;
    this.failure.set(undefined);
    this.boardFiles.upload(boardId, file).subscribe({
      next: (added) => added && this.replaced.emit((element) => withFile(element as Part, added)),
      error: (error: unknown) => {
        const problem = apiProblemOf(error);
        const why = problem.fields.length ? '' : ` ${problem.message}`;
        this.failure.set({ text: `${file.name} was not taken.${why}`, fields: problem.fields });
      },
    });
  }
}

function withFile(element: Part, file: BoardFile | undefined): Part {
  const {
    fileId: _fileId,
    file: _file,
    portOrder: _order,
    ports: _ports,
    portOrderConfirmed: _sure,
    ...rest
  } = element;
  if (!file) return rest;
  const likely = portOrders.find((order) => order === file.likelyPortOrder);
  return { ...rest, fileId: file.id, ...(file.ports === 4 ? { portOrder: likely ?? '1-3,2-4' } : {}) };
}

function references({ referenceOhm }: BoardFile): string {
  const texts = [
    ...new Set(referenceOhm.map(([re, im]) => (im === 0 ? `${re}` : `${re}${im < 0 ? '' : '+'}${im}j`))),
  ];
  return `${texts.join(', ')} ohm`;
}
